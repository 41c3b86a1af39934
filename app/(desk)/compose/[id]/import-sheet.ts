import { z } from 'zod';
import { parseSheetText } from '@/lib/claims/sheet-text';
import { formatProblem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';

/** Enough shape to be edited; what the words mean is judged by the check, with every problem listed. */
const loadable = z.looseObject({
  format: z.literal('counterfoil-claim/1', { error: '"counterfoil-claim/1" as the format' }),
  title: z.string().max(300).default(''),
  statement: z.string().max(100_000).default(''),
  waveforms: z.record(z.string(), z.looseObject({})).default({}),
  noise: z.record(z.string(), z.looseObject({})).default({}),
  claims: z.array(z.looseObject({})).max(200).default([]),
});

/** The text of a `claim.json` as a draft, or the sentences that say what it is not. */
export function readClaimJson(text: string): Result<DraftSheet, readonly string[]> {
  const json = parseSheetText(new TextEncoder().encode(text));
  if (!json.ok) return err(json.error.map((problem) => `claim.json: ${formatProblem(problem).replace(/^: /, '')}`));
  const sheet = loadable.safeParse(json.value);
  if (sheet.success) return ok(sheet.data as DraftSheet);
  return err(sheet.error.issues.map((issue) => `claim.json, /${issue.path.map(String).join('/')}: expected ${issue.message}.`));
}

export interface Merged {
  readonly sheet: DraftSheet;
  /** What had to take another name, in words. */
  readonly renamed: readonly string[];
}

type Json = Readonly<Record<string, unknown>>;
const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** Adds a sheet to a draft. Nothing of the draft is changed: what comes in under a taken name takes another, and its claims follow it. */
export function mergeSheets(draft: DraftSheet, incoming: DraftSheet): Merged {
  const waveforms = added(draft.waveforms, incoming.waveforms);
  const noise = added(draft.noise, incoming.noise);
  const ids = new Set(draft.claims.map((claim) => claim['id']));
  const renamedClaims: string[] = [];
  const claims = incoming.claims.filter((claim) => !draft.claims.some((own) => same(own, claim))).map((claim) => {
    const id = freeName(String(claim['id'] ?? 'C'), ids);
    if (id !== claim['id']) renamedClaims.push(`claim ${String(claim['id'])} is now ${id}`);
    ids.add(id);
    return { ...renamedIn(claim, waveforms.names, noise.names), id };
  });
  const words = (kind: string, names: ReadonlyMap<string, string>) => [...names].flatMap(([from, to]) => (from === to ? [] : [`${kind} ${from} is now ${to}`]));
  return {
    sheet: { ...draft, title: draft.title || incoming.title, statement: draft.statement || incoming.statement, waveforms: waveforms.all, noise: noise.all, claims: [...draft.claims, ...claims] },
    renamed: [...words('waveform', waveforms.names), ...words('noise curve', noise.names), ...renamedClaims],
  };
}

function added(own: Readonly<Record<string, Json>>, incoming: Readonly<Record<string, Json>>): { readonly all: Record<string, Json>; readonly names: ReadonlyMap<string, string> } {
  const all: Record<string, Json> = { ...own };
  const names = new Map<string, string>();
  for (const [name, part] of Object.entries(incoming)) {
    const to = Object.hasOwn(all, name) && !same(all[name], part) ? freeName(name, new Set(Object.keys(all))) : name;
    all[to] = part;
    names.set(name, to);
  }
  return { all, names };
}

function freeName(wanted: string, taken: ReadonlySet<unknown>): string {
  let name = wanted;
  for (let i = 2; taken.has(name); i++) name = `${wanted}-${i}`;
  return name;
}

function renamedIn(claim: Json, waveforms: ReadonlyMap<string, string>, noise: ReadonlyMap<string, string>): Json {
  const to = (names: ReadonlyMap<string, string>, value: unknown): unknown => (typeof value === 'string' ? (names.get(value) ?? value) : value);
  const of = claim['of'];
  return {
    ...claim,
    ...(typeof of === 'object' && of !== null ? { of: Object.fromEntries(Object.entries(of).map(([role, name]) => [role, to(waveforms, name)])) } : {}),
    ...(claim['noise'] === undefined ? {} : { noise: to(noise, claim['noise']) }),
  };
}

export const isEmptySheet = ({ title, statement, waveforms, noise, claims }: DraftSheet): boolean =>
  title === '' && statement === '' && claims.length === 0 && Object.keys(waveforms).length === 0 && Object.keys(noise).length === 0;
