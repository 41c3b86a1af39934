import { asc, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { findingAnswers } from '@/db/schema/finding-answers';

export const listFindingAnswers = (reader: Reader, revisionId: string) =>
  reader
    .select({ code: findingAnswers.code, where: findingAnswers.place, text: findingAnswers.finding, answer: findingAnswers.answer })
    .from(findingAnswers)
    .where(eq(findingAnswers.revisionId, revisionId))
    .orderBy(asc(findingAnswers.code), asc(findingAnswers.place), asc(findingAnswers.finding));
