import { z } from 'zod';

export const failedJobsSchema = z.array(z.object({ id: z.string(), task: z.string(), payload: z.unknown(), attempts: z.int(), lastError: z.string(), failedAt: z.string() }));
