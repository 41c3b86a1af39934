import { z } from 'zod';
import type { ComposerFields } from './fields';

const name = z.string().trim().min(1, 'Give it a name.').max(64, 'A name of at most 64 characters.').regex(/^[^\p{C}]*$/u, 'Printable characters only.');
const numeric = z.string().refine((text) => text.trim() === '' || Number.isFinite(Number(text)), 'A plain number, such as 0.05 or 1e-3.');

const once = (part: string, read: (row: Record<string, unknown>) => unknown) => (rows: readonly unknown[], context: z.RefinementCtx) => {
  const seen = new Set<string>();
  rows.forEach((row, i) => {
    const value = String(read(row as Record<string, unknown>) ?? '').trim();
    if (value !== '' && seen.has(value)) context.addIssue({ code: 'custom', path: [i, part], message: `${value} is taken; another name tells them apart.` });
    seen.add(value);
  });
};

/**
 * What the form itself can tell while it is typed. It never bars saving: an unfinished draft is a
 * draft all the same, and the check judges the sheet as a whole.
 */
export const composerSchema = z.looseObject({
  title: z.string().max(300, 'At most 300 characters.'),
  statement: z.string().max(100_000, 'At most 100,000 characters.'),
  waveforms: z.array(z.looseObject({ name, totalMassMsun: numeric, distanceMpc: numeric, junkEndM: numeric, massRatio: numeric, chi1z: numeric, chi2z: numeric, admEnergy: numeric, admAngularMomentum: numeric, remnantMass: numeric, remnantSpin: numeric, eccentricity: numeric, fieldGauss: numeric, resolution: numeric, extractionRadiusM: numeric })).superRefine(once('name', (row) => row['name'])),
  noise: z.array(z.looseObject({ name })).superRefine(once('name', (row) => row['name'])),
  claims: z.array(z.looseObject({ id: name, quantity: z.string().min(1, 'Choose a quantity.'), tolerance: numeric })).superRefine(once('id', (row) => row['id'])),
}) as unknown as z.ZodType<ComposerFields, ComposerFields>;
