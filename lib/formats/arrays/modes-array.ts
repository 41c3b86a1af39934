import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Problem } from '@/lib/kernel/problem';
import { ok, type Result } from '@/lib/kernel/result';
import { shapeText } from './array-source';
import { refusal, type PartReader } from './series';

const mostModes = 2000;
const highestL = 40;

/** The (l, m) of each series: from the array that the sheet names, else from an attribute of the data. */
export async function modesArray({ room, layout, leastL }: PartReader, dataPath: string): Promise<Result<ModeIndex[], Problem[]>> {
  const listed = layout.parts.find(({ role }) => role.kind === 'modes');
  if (listed) return fromArray(room, listed.path, leastL);
  const modes = await room.source.listedModes(dataPath);
  if (modes === null) return refusal('formats/no-modes', room.where(dataPath), 'no attribute that lists the (l, m) of each series', 'a list of modes', 'Name an L×2 array of whole numbers under "modes".');
  return judged(room.where(dataPath), modes, leastL);
}

async function fromArray(room: PartReader['room'], path: string, leastL: number): Promise<Result<ModeIndex[], Problem[]>> {
  const facts = await room.source.facts(path);
  if (!facts.ok) return facts;
  const { shape, complex } = facts.value;
  if (complex || shape.length !== 2 || shape[1] !== 2 || shape[0]! < 1 || shape[0]! > mostModes) return refusal('formats/array-shape', room.where(path), shapeText(shape, complex), 'L×2 whole numbers, one (l, m) a row');
  const read = await room.read(path, facts.value, { samples: 0, series: 1, pair: null });
  if (!read.ok) return read;
  const [l, m] = read.value;
  return judged(room.where(path), Array.from(l!, (x, i): ModeIndex => [x, m![i]! + 0]), leastL);
}

function judged(where: string, modes: ModeIndex[], leastL: number): Result<ModeIndex[], Problem[]> {
  const seen = new Set<string>();
  for (const [l, m] of modes) {
    const isMode = Number.isInteger(l) && Number.isInteger(m) && l >= leastL && l <= highestL && Math.abs(m) <= l;
    if (!isMode) return refusal('formats/mode', where, `the mode (${l}, ${m})`, `whole numbers with l from ${leastL} to ${highestL} and |m| ≤ l`);
    if (seen.has(`${l},${m}`)) return refusal('formats/mode', where, `the mode (${l}, ${m}) twice`, 'each mode once');
    seen.add(`${l},${m}`);
  }
  return ok(modes);
}
