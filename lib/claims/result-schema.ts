import { z } from 'zod';

/** `counterfoil-result/1` as a schema: what scripts of authors may rely on. Fields may be added, so unknown ones are let through. */
const nullable = z.number().nullable();
const verdict = z.enum(['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree']);

const point = z.looseObject({
  at: z.record(z.string(), z.union([z.number(), z.string()])),
  claimed: z.union([z.number(), z.object({ above: z.number() }), z.object({ below: z.number() })]),
  printed: z.string(),
  tolerance: nullable,
  value: nullable,
  expandedUncertainty: nullable,
  routes: z.object({ A: nullable, B: nullable }),
  apart: nullable,
  verdict,
  because: z.string().optional(),
  components: z.record(z.string(), nullable).optional(),
  settings: z.record(z.string(), z.unknown()).optional(),
});

const finding = z.looseObject({
  code: z.string(),
  level: z.enum(['stops-lodging', 'needs-answer', 'worth-a-look', 'note']),
  text: z.string(),
  where: z.string(),
  fix: z.string().optional(),
  at: z.record(z.string(), z.union([z.number(), z.string()])).optional(),
});

const budgetLine = z.looseObject({
  component: z.string(),
  id: z.string(),
  group: z.enum(['computation', 'coverage']),
  u: nullable,
  note: z.string(),
  degreesOfFreedom: z.number().optional(),
  shape: z.enum(['rectangular', 'normal']).optional(),
  share: nullable.optional(),
});

/** A whole budget, or one group of it, as one uncertainty; what is missing is not in it. */
const total = z.looseObject({
  u: nullable,
  degreesOfFreedom: nullable,
  coverageFactor: z.number(),
  expanded: nullable,
  interval: z.object({ low: z.number(), high: z.number() }).optional(),
  missing: z.array(z.string()),
});

const metricBound = z.looseObject({
  low: nullable,
  high: nullable,
  knownTo: z.array(z.looseObject({ waveform: z.string(), relative: z.string(), by: z.enum(['resolution', 'radius']), mismatch: z.number() })),
  missing: z.array(z.string()),
});

const sensitivity = z.looseObject({
  setting: z.string(),
  standing: z.enum(['declared', 'assumed', 'swept']),
  unit: z.string().optional(),
  used: z.unknown(),
  tried: z.unknown(),
  value: nullable,
  change: nullable,
  inTolerances: nullable,
  because: z.string().optional(),
});

/** A reading under which the claim would agree; a hint to people, never a verdict. */
const candidate = z.looseObject({
  id: z.string(),
  settings: z.record(z.string(), z.unknown()),
  values: z.array(nullable),
  chance: z.number().min(0).max(1),
  tried: z.int(),
  standing: z.enum(['candidate', 'coincidence']),
  odds: z.number(),
  readings: z.array(z.looseObject({ conventions: z.array(z.string()), clause: z.string(), settings: z.record(z.string(), z.unknown()), evidence: z.enum(['supports', 'contradicts', 'none']), evidenceFrom: z.string().nullable() })).min(1),
  explains: z.array(z.string()),
  breaks: z.array(z.string()),
  changes: z.union([z.literal(1), z.literal(2)]),
  sentence: z.string(),
});

const search = z.looseObject({
  tried: z.int(),
  failed: z.int(),
  left: z.int(),
  decoys: z.int(),
  stoppedBecause: z.string().nullable(),
  extraNumber: z.looseObject({ setting: z.string(), at: z.number(), unit: z.string(), predictions: z.array(z.looseObject({ candidate: z.string().nullable(), value: z.number(), expandedUncertainty: nullable })), apart: z.number(), sentence: z.string() }).nullable(),
  sentence: z.string(),
  readings: z.array(z.looseObject({ id: z.string(), clause: z.string().optional(), values: z.array(nullable).optional(), because: z.string().optional() })),
});

/** What a file says of a word of the sheet; it moves no number until its author confirms it. */
const guess = z.looseObject({
  about: z.string(),
  part: z.enum(['waveforms', 'noise']),
  name: z.string(),
  field: z.string(),
  standing: z.enum(['declared', 'assumed']),
  value: z.union([z.string(), z.number()]).nullable(),
  agrees: z.boolean(),
  proposed: z.string(),
  changes: z.array(z.looseObject({ field: z.string(), value: z.unknown() })).nullable(),
  reason: z.string(),
  confidence: z.number().min(0).max(1),
  convention: z.looseObject({ id: z.string(), title: z.string(), sentence: z.string() }).nullable(),
});

export const resultClaimSchema = z.looseObject({
  id: z.string(),
  quantity: z.string(),
  unit: z.string(),
  verdict,
  remarks: z.array(z.string()),
  coverage: z.object({ state: z.enum(['covered', 'understated', 'unknown']), missing: z.array(z.string()).optional(), factor: z.number().optional() }),
  points: z.array(point).min(1),
  budget: z.array(budgetLine),
  uncertainty: z.looseObject({ computation: total, data: total }).optional(),
  metricBound: metricBound.optional(),
  sensitivities: z.array(sensitivity).optional(),
  assumed: z.array(z.string()),
  settings: z.array(z.looseObject({ name: z.string(), value: z.unknown(), standing: z.enum(['declared', 'assumed', 'swept']), unit: z.string().optional() })),
  routeB: z.array(z.int()),
  findings: z.array(finding),
  candidates: z.array(candidate),
  search: search.optional(),
});

export const resultSchema = z.looseObject({
  format: z.literal('counterfoil-result/1'),
  engine: z.string(),
  title: z.string(),
  files: z.array(z.object({ name: z.string(), bytes: z.int(), sha256: z.string() })),
  claims: z.array(resultClaimSchema).min(1),
  guesses: z.array(guess).optional(),
});
