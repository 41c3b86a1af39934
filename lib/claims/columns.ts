import type { Column, ColumnRole } from '@/lib/engine/contract/layout';
import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Problem } from '@/lib/kernel/problem';
import { didYouMean } from './nearest-name';
import { describe, pointer } from './pointer';

const highestL = 40;
const waveformNames = ['t', 'f', 're', 'im', 'plus', 'cross', 'amplitude', 'phase', 're22', 'im22', 'amp22', 'phase22', 'L', '_'];
const noiseNames = ['f', 'asd', 'psd', 'characteristic', '_'];

/**
 * Columns of a waveform file. A mode is appended to the name: `re22`, `im2-1`, `amp33`. With an l or
 * m of two digits the digits alone would be ambiguous, so a comma parts them: `re10,-10`; it may
 * always be written.
 */
export function waveformColumns(names: readonly string[], domain: 'time' | 'frequency', leastL: number, path: readonly PropertyKey[], problems: Problem[]): Column[] {
  return names.map((name, i) => {
    const where = pointer(...path, i);
    const role = waveformRole(name, domain);
    if (role === null) problems.push(unknownColumn(name, where, waveformNames));
    else if ('mode' in role && role.mode) problems.push(...modeFaults(role.mode, name, leastL, where));
    return { name, role: role ?? { kind: 'skip' } };
  });
}

export function noiseColumns(names: readonly string[], path: readonly PropertyKey[], problems: Problem[]): Column[] {
  const columns = names.map((name, i): Column => {
    if (name === 'f') return { name, role: { kind: 'axis' } };
    if (name === 'asd' || name === 'psd' || name === 'characteristic') return { name, role: { kind: 'noise', meaning: name } };
    if (name !== '_') problems.push(unknownColumn(name, pointer(...path, i), noiseNames));
    return { name, role: { kind: 'skip' } };
  });
  countOnce(columns, 'axis', '"f" once', path, problems);
  countOnce(columns, 'noise', 'one of "asd", "psd", "characteristic", once', path, problems);
  return columns;
}

function countOnce(columns: readonly Column[], kind: ColumnRole['kind'], expected: string, path: readonly PropertyKey[], problems: Problem[]): void {
  const n = columns.filter((column) => column.role.kind === kind).length;
  if (n !== 1) problems.push({ code: 'claims/columns', where: pointer(...path), saw: `${describe(columns.map((column) => column.name))}`, expected: `the column ${expected}` });
}

const unknownColumn = (name: string, where: string, known: readonly string[]): Problem => {
  const hint = didYouMean(name, known);
  return { code: 'claims/columns', where, saw: `the unknown column ${describe(name)}`, expected: `one of ${known.join(', ')}`, ...(hint ? { hint } : {}) };
};

function waveformRole(name: string, domain: 'time' | 'frequency'): ColumnRole | null {
  if (name === '_') return { kind: 'skip' };
  if (name === (domain === 'time' ? 't' : 'f')) return { kind: 'axis' };
  if (name === 'plus' || name === 'cross') return { kind: name };
  if (name === 'L') return { kind: 'luminosity' };
  const found = /^(re|im|amplitude|amp|phase)(?:(\d)(-?\d)|(\d{1,2}),(-?\d{1,2}))?$/.exec(name);
  if (!found) return null;
  const kind = found[1] === 'amp' ? 'amplitude' : (found[1] as 're' | 'im' | 'amplitude' | 'phase');
  const l = found[2] ?? found[4];
  const m = found[3] ?? found[5];
  return { kind, mode: l === undefined || m === undefined ? null : [Number(l), Number(m) + 0] };
}

/** A mode that no spin-weighted harmonic has. */
export function modeFaults([l, m]: ModeIndex, name: string, leastL: number, where: string): Problem[] {
  if (l >= leastL && l <= highestL && Math.abs(m) <= l) return [];
  return [{ code: 'claims/mode', where, saw: `the mode l = ${l}, m = ${m} in ${describe(name)}`, expected: `l from ${leastL} to ${highestL} and |m| ≤ l` }];
}

/** Do the columns make a series: one axis, whole pairs, one kind of content, no mode twice? */
export function layoutProblems(columns: readonly Column[], axis: 't' | 'f', luminosity: boolean, path: readonly PropertyKey[]): Problem[] {
  const where = pointer(...path);
  const saw = describe(columns.map((column) => column.name));
  const problem = (expected: string, hint?: string): Problem => ({ code: 'claims/columns', where, saw, expected, ...(hint ? { hint } : {}) });
  const problems: Problem[] = [];
  const roles = columns.map((column) => column.role);
  if (roles.filter((role) => role.kind === 'axis').length !== 1) problems.push(problem(`the column "${axis}" once`));
  const curves = roles.filter((role) => role.kind === 'luminosity').length;
  if (luminosity || curves > 0) {
    const alone = roles.every((role) => role.kind === 'axis' || role.kind === 'luminosity' || role.kind === 'skip');
    if (!luminosity) problems.push(problem('"L" only beside variable "luminosity"'));
    else if (curves !== 1 || !alone) problems.push(problem('"t" and "L" once each, the luminosity in erg/s'));
    return problems;
  }
  const polarised = roles.filter((role) => role.kind === 'plus' || role.kind === 'cross');
  const modal = roles.filter((role) => 'mode' in role);
  if (polarised.length > 0 && modal.length > 0) problems.push(problem('either plus and cross, or modes, not both'));
  if (polarised.length + modal.length === 0) problems.push(problem('at least one of "re im", "plus cross", "plus", "amplitude phase"'));
  if (new Set(polarised.map((role) => role.kind)).size < polarised.length) problems.push(problem('"plus" and "cross" once each'));
  if (polarised.length === 1 && polarised[0]?.kind === 'cross') problems.push(problem('"plus" beside "cross"'));
  return [...problems, ...pairProblems(columns, problem)];
}

function pairProblems(columns: readonly Column[], problem: (expected: string, hint?: string) => Problem): Problem[] {
  const kindsOfMode = new Map<string, string[]>();
  for (const { role } of columns) if ('mode' in role) kindsOfMode.set(String(role.mode ?? ''), [...(kindsOfMode.get(String(role.mode ?? '')) ?? []), role.kind]);
  const problems: Problem[] = [];
  if (kindsOfMode.has('') && kindsOfMode.size > 1) problems.push(problem('the mode in every column name, or in none'));
  for (const [mode, kinds] of kindsOfMode) {
    const whole = [...kinds].sort().join(' ');
    if (whole === 'im re' || whole === 'amplitude phase') continue;
    const of = mode === '' ? '' : ` for the mode ${mode}`;
    const repeated = new Set(kinds).size < kinds.length || kinds.length > 2;
    problems.push(problem(repeated ? `each mode once${mode === '' ? '' : `; ${mode} is declared twice`}` : `"re" with "im", or "amplitude" with "phase"${of}`));
  }
  return problems;
}
