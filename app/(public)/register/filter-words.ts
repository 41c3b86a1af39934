export const verdictChoices = [
  { value: 'agrees', label: 'agrees' },
  { value: 'differs', label: 'differs' },
  { value: 'unsettled', label: 'is unsettled' },
  { value: 'not-computable', label: 'is not computable' },
  { value: 'routes-disagree', label: 'has routes that disagree' },
] as const;

export const verdictWord = (verdict: string): string => verdictChoices.find((choice) => choice.value === verdict)?.label ?? verdict;
