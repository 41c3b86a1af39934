import { z } from 'zod';

/** One thing to mend; see `lib/kernel/problem.ts`. */
export const problemSchema = z
  .object({
    code: z.string().describe('Room and cause, such as `claims/unknown-setting`.'),
    where: z.string().describe('A JSON Pointer into the body or the claim sheet, `/name` of a parameter, or `file:line` of a data file; empty for the whole.'),
    saw: z.string(),
    expected: z.string(),
    hint: z.string().optional(),
  })
  .meta({ id: 'OneProblem' });

/** RFC 9457. Every refusal has this shape. */
export const problemDocumentSchema = z
  .object({
    type: z.string().describe('An address of this site that explains the kind of problem.'),
    title: z.string(),
    status: z.int(),
    detail: z.string().describe('One sentence: what was seen, what was expected, what to do next.'),
    problems: z.array(problemSchema).optional(),
    reference: z.string().optional().describe('For the administrator, when the defect is ours.'),
  })
  .meta({ id: 'Problem' });
