import { z } from 'zod';

const words = z.string().max(1000).optional();

/** Names that a search of the register has; what stands in them is judged where the register is read. */
export const askedOfRegister = z.strictObject({ text: words, quantity: words, verdict: words, noise: words, from: words, to: words, standing: words });
