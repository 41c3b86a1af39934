import type { Candidate, SearchOfClaim } from '../candidate';
import { chanceOf, decoyMisfits, decoysOf, type Misfits } from './chance';
import { classesOf, fittingOf, type ReadingClass } from './classes';
import { seedOf } from './seed';
import type { JudgedClaim, TriedNode } from './node';
import { resolutionOf } from './scaled-claim';
import { sheetOf, type Sheet } from './trials';
import { listed, weigh } from './weigh';

/** What the search of one claim found and what it took; how far it got is known to whoever ran the readings. */
export interface Judged {
  readonly candidates: readonly Candidate[];
  readonly search: Omit<SearchOfClaim, 'left' | 'stoppedBecause' | 'extraNumber' | 'sentence' | 'readings'>;
  /** Readings under which the claim would agree; more than are listed, at times. */
  readonly fitting: number;
  /** How often two numbers were compared: what judging took, counted. */
  readonly comparisons: number;
}

export interface JudgeOptions {
  /** Of the sheet, such as its digest; the claim's name is added. */
  readonly seed: string;
  readonly decoys?: number;
}

const DECOYS = 2000;

/** All claims of a sheet together: those that want an explanation get the readings under which they would agree. */
export function judge(claims: readonly JudgedClaim[], tried: readonly TriedNode[], { seed, decoys = DECOYS }: JudgeOptions): ReadonlyMap<string, Judged> {
  const sheet = sheetOf(claims, tried);
  return new Map(claims.flatMap(({ id, wanting }, c) => (wanting ? [[id, judgeClaim(sheet, c, { seed, decoys })] as const] : [])));
}

function judgeClaim(sheet: Sheet, c: number, options: Required<JudgeOptions>): Judged {
  const fitting = fittingOf(sheet, c);
  const classes = classesOf(sheet, fitting);
  const chances = chancesOf(sheet, c, classes, options);
  const touching = sheet.trials.filter(({ held }) => held[c] !== null);
  const points = sheet.claims[c]!.claim.points.length;
  return {
    candidates: listed(classes.map((one, i) => weigh(sheet, c, one, chances.of[i]!))),
    search: { tried: touching.length, failed: touching.filter(({ held }) => held[c]!.row === null).length, decoys: chances.decoys },
    fitting: fitting.length,
    comparisons: chances.comparisons + touching.length * points,
  };
}

interface Chances {
  readonly of: readonly number[];
  readonly decoys: number;
  readonly comparisons: number;
}

/** Decoys are drawn where something fits; those of pairs are held against single flips too. */
function chancesOf(sheet: Sheet, c: number, classes: readonly ReadingClass[], { seed, decoys }: Required<JudgeOptions>): Chances {
  const scaled = sheet.claims[c]!;
  if (classes.length === 0) return { of: [], decoys: 0, comparisons: 0 };
  const drawn = decoysOf(scaled, seedOf(`${seed} ${scaled.claim.id}`), decoys);
  const floor = resolutionOf(scaled);
  const thresholds = classes.map(({ trials }) => Math.max(floor, ...trials.map(({ held }) => held[c]!.misfit)));
  const [most, enough] = [Math.max(...thresholds), Math.min(...thresholds)];
  const against = (changes: 1 | 2): Misfits => decoyMisfits(drawn, sheet.trials.flatMap((trial) => (trial.changes === changes && trial.held[c]?.row ? [trial.held[c].row] : [])), most, enough);
  const singles = against(1);
  const pairs = classes.some(({ changes }) => changes === 2) ? against(2) : null;
  const of = classes.map(({ changes }, i) => chanceOf(changes === 2 && pairs ? [singles.best, pairs.best] : [singles.best], decoys, thresholds[i]!));
  return { of, decoys, comparisons: singles.comparisons + (pairs?.comparisons ?? 0) };
}
