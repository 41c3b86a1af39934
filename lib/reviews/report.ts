/** The report form and the recommendation (domain.md 6.6), as one table that form, schema and page are drawn from. */
export const REPORT_QUESTIONS = [
  { id: 'definition', text: 'Is the quantity defined so that it can be recomputed?', required: true },
  { id: 'conventions', text: 'Do the settings declared match the text of the work?', required: true },
  { id: 'data', text: 'Are the data fit: length, sampling, start-up, modes, resolution?', required: true },
  { id: 'budget', text: 'Is the error budget credible, what is missing?', required: true },
  { id: 'scope', text: 'Is the scope of the statement justified?', required: true },
  { id: 'candidates', text: 'If the server suggests other settings: your view.', required: false },
] as const;
export type ReportQuestion = (typeof REPORT_QUESTIONS)[number]['id'];
export type ReportAnswers = Readonly<Record<ReportQuestion, string>>;

export const RECOMMENDATIONS = ['enter-1', 'enter-2', 'enter-3', 'minor', 'major', 'set-aside', 'outside'] as const;
export type Recommendation = (typeof RECOMMENDATIONS)[number];

export const RECOMMENDATION_WORDS: Readonly<Record<Recommendation, string>> = {
  'enter-1': 'Enter at level 1',
  'enter-2': 'Enter at level 2',
  'enter-3': 'Enter at level 3',
  minor: 'Minor changes',
  major: 'Major changes',
  'set-aside': 'Set aside',
  outside: 'Outside my competence',
};

export const CONFIDENCES = [1, 2, 3, 4, 5] as const;
export type Confidence = (typeof CONFIDENCES)[number];

export const REPORT_ANSWER_MAX_CHARACTERS = 8000;

/** Questions still without an answer; a report is handed in when there are none. */
export const unanswered = (answers: ReportAnswers): ReportQuestion[] =>
  REPORT_QUESTIONS.filter((q) => q.required && answers[q.id].trim() === '').map((q) => q.id);

/** A report "outside my competence" is kept and read, but is no report towards a level. */
export const countsTowardsLevel = (recommendation: Recommendation): boolean => recommendation !== 'outside';
