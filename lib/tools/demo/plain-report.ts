import type { ReportAnswers } from '@/lib/reviews/report';

type Answers = Omit<ReportAnswers, 'candidates'>;

/** What a referee writes where nothing is amiss; a course says what is. */
export const plainReport = (said: Partial<Answers>): Answers => ({
  definition: 'Yes, from what the sheet declares.',
  conventions: 'They match the text.',
  data: 'Long enough and finely sampled for what is claimed.',
  budget: 'The numerical part is small beside the printed digits. A second resolution is missing, so the part of the simulation stays unknown.',
  scope: 'Worded for what was computed, and no more.',
  ...said,
});
