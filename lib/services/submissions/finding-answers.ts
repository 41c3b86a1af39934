/** An answer fits a finding that says the very same of the same place. */
export interface FindingAnswer {
  readonly code: string;
  readonly where: string;
  readonly text: string;
  readonly answer: string;
}

type Named = Omit<FindingAnswer, 'answer'>;

export const answerTo = (answers: readonly FindingAnswer[], finding: Named): string | null =>
  answers.find((a) => a.code === finding.code && a.where === finding.where && a.text === finding.text)?.answer ?? null;
