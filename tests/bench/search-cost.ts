import { createHash } from 'node:crypto';
import { createReadStream, readFileSync } from 'node:fs';
import path from 'node:path';
import { match } from '@/lib/engine/quantities/match';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { catalogue } from '@/lib/pipeline/catalogue';
import { HashedFiles } from '@/lib/pipeline/hashed-files';
import { resolveInputs } from '@/lib/pipeline/measure-claim';
import { readInputs } from '@/lib/pipeline/read-inputs';
import { reproduce } from '@/lib/pipeline/reproduce';
import { timed } from './stopwatch';

const folder = path.join(process.cwd(), 'content', 'specimens', 'spin-visible');
const sheetJson: unknown = JSON.parse(readFileSync(path.join(folder, 'claim.json'), 'utf8'));
const openFile = (name: string) => createReadStream(path.join(folder, name));
const digest = () => {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
};
const quiet = { onProgress: () => undefined, cancelled: () => false };

const whole = (explain: boolean) => reproduce({ sheetJson, openFile }, { withFigures: false, ...quiet, digest, ...(explain && { explain: { endedBy: () => null } }) });

/** One match at one mass by route A, from samples in memory, nothing prepared. */
async function oneMatch(): Promise<() => unknown> {
  const sheet = parseClaimSheet(sheetJson, catalogue);
  if (!sheet.ok) throw new Error(JSON.stringify(sheet.error));
  const inputs = await readInputs(sheet.value, new HashedFiles(openFile, digest), () => undefined);
  const [claim] = sheet.value.claims;
  const resolved = inputs.ok && claim ? resolveInputs(claim, sheet.value, inputs.value) : null;
  if (!claim || resolved === null) throw new Error('the specimen cannot be read');
  const request = { claimId: claim.id, inputs: resolved, settings: { ...claim.settings, totalMassMsun: 60 }, over: null, claimed: [null], withFigures: false, routeAOnly: true };
  return () => match.measure(request, quiet);
}

/** What the search of a claim of three points costs, in single matches: the whole run with it less the run without. */
export async function searchCost(): Promise<string> {
  const match1 = await oneMatch();
  match1();
  const one = Math.min(...(await Promise.all([0, 1, 2, 3, 4].map(() => timed(match1)))).map(({ cpuSeconds }) => cpuSeconds));
  const without = await timed(() => whole(false));
  const searched = await timed(() => whole(true));
  if (!searched.value.ok) throw new Error(JSON.stringify(searched.value.error));
  const search = searched.value.value.result.claims[0]?.search;
  const ratio = (searched.cpuSeconds - without.cpuSeconds) / one;
  return `The search for another reading (specimen spin-visible, three points) tried ${search?.tried} readings at **${ratio.toFixed(0)} ×** the cost of one match by route A from samples in memory (${(1000 * one).toFixed(0)} ms of processor time); the run without it costs ${(without.cpuSeconds / one).toFixed(0)} ×.`;
}
