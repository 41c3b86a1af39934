import { createHash } from 'node:crypto';
import { createReadStream, readFileSync } from 'node:fs';
import path from 'node:path';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { Reproduced } from '@/lib/pipeline/reproduce-with';
import type { ResultClaim } from '@/lib/pipeline/result';

export type SheetClaim = Record<string, unknown> & { readonly settings?: Record<string, unknown> };

interface Asking {
  readonly pick: (claim: SheetClaim) => boolean;
  readonly change?: (claim: SheetClaim) => SheetClaim;
  /** Facts beside every file of the sheet. */
  readonly binary?: Record<string, number>;
  readonly withFigures?: boolean;
  readonly otherwise?: ReadOtherwise;
}

const digest = () => {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
};

/** Any sheet through the pipeline, its files out of memory or from a folder. */
export const run = (sheetJson: unknown, openFile: (name: string) => AsyncIterable<Uint8Array>, { withFigures = false, otherwise }: Partial<Asking> = {}): Promise<Result<Reproduced, Problem[]>> =>
  reproduce({ sheetJson, openFile }, { withFigures, digest, onProgress: () => undefined, cancelled: () => false, ...(otherwise && { otherwise }) });

/** The first claim of a specimen that fits, with changes put in, through the pipeline itself. */
export function runClaim(specimen: string, { pick, change = (claim) => claim, binary = {}, ...how }: Asking): Promise<Result<Reproduced, Problem[]>> {
  const folder = path.resolve('content/specimens', specimen);
  const sheet = JSON.parse(readFileSync(path.join(folder, 'claim.json'), 'utf8')) as { claims: SheetClaim[]; waveforms: Record<string, { binary?: object }> };
  const waveforms = Object.fromEntries(Object.entries(sheet.waveforms).map(([name, one]) => [name, { ...one, binary: { ...one.binary, ...binary } }]));
  return run({ ...sheet, waveforms, claims: sheet.claims.filter(pick).slice(0, 1).map(change) }, (name) => createReadStream(path.join(folder, name)) as AsyncIterable<Uint8Array>, how);
}

export function oneClaim(done: Result<Reproduced, Problem[]>): ResultClaim {
  const claim = done.ok ? done.value.result.claims[0] : undefined;
  if (!claim) throw new Error(JSON.stringify(done.ok ? 'no claim came back' : done.error));
  return claim;
}

export const ofQuantity = (quantity: string) => (claim: SheetClaim): boolean => claim['quantity'] === quantity;
