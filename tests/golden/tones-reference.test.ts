import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync, copyFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ResultClaim } from '@/lib/pipeline/result';
import { runFolder } from './run-folder';

/** Claim sheets with data beside this project; they are read, and those of their claims that stand here are run. */
const sheets = join('..', 'shared', 'reference', 'sheets');
const isThere = existsSync(sheets);
const title = (what: string): string => (isThere ? what : `${what} (skipped: ${sheets} is missing)`);

interface Figure {
  readonly value: number;
  readonly tolerance: number;
  readonly kind: 'rel' | 'abs';
}
interface Expected {
  readonly points: readonly Figure[];
  readonly components?: Readonly<Record<string, Figure>>;
}
interface Sheet {
  readonly waveforms: Readonly<Record<string, { readonly file: string }>>;
  readonly claims: readonly { readonly id: string; readonly quantity: string }[];
}

const json = (...path: string[]): unknown => JSON.parse(readFileSync(join(...path), 'utf8'));
const within = ({ value, tolerance, kind }: Figure) => [value, kind === 'rel' ? { relative: tolerance } : tolerance] as const;

const cases: readonly (readonly [sheet: string, ids: readonly string[]])[] = [
  ['simulation', ['ringdown-f', 'ringdown-d', 'ringdown-f-house', 'ringdown-d-house']],
  ['run5-alignment', ['amplitude', 'phase']],
];

describe.runIf(isThere).each(cases)(title('the reference sheet %s (required: independent derivation; ringdown: peak by a parabola through five samples, straight lines through phase and log amplitude in the window by least squares; alignment: cubic splines of phase and amplitude, the shift by bounded minimisation, differences on 20001 points; closed forms and continued fractions)'), (name, ids) => {
  const folder = isThere ? mkdtempSync(join(tmpdir(), 'tones-')) : '';
  const expected = isThere ? (json(sheets, name, 'expected.json') as { claims: Record<string, Expected> }).claims : {};
  let claims: ReadonlyMap<string, ResultClaim> = new Map();

  beforeAll(async () => {
    const sheet = json(sheets, name, 'claim.json') as Sheet;
    const { noise: _unused, ...rest } = sheet as Sheet & { readonly noise?: unknown };
    for (const { file } of Object.values(sheet.waveforms)) copyFileSync(join(sheets, name, file), join(folder, file));
    writeFileSync(join(folder, 'claim.json'), JSON.stringify({ ...rest, claims: sheet.claims.filter(({ id }) => ids.includes(id)) }));
    claims = await runFolder(folder);
  }, 300_000);
  afterAll(() => rmSync(folder, { recursive: true }));

  it.each(ids)('gives %s as expected by both routes, and agrees', (id) => {
    const claim = claims.get(id)!;
    const [figure] = expected[id]!.points;
    const [point] = claim.points;
    expect(point!.routes.A).toAgreeWith(...within(figure!));
    expect(point!.routes.B).toAgreeWith(...within(figure!));
    for (const [component, want] of Object.entries(expected[id]!.components ?? {})) expect(point!.components?.[component], component).toAgreeWith(...within(want));
    expect(claim.verdict).toBe('agrees');
  });
});
