import { formatWithUncertainty, type ReadAgainst } from '@/app/_ui/math/format-uncertainty';
import { unitText } from '@/app/_ui/math/units';

interface VariedNumberProps {
  readonly value: number | null;
  readonly u: number | null;
  readonly unit: string;
  readonly against: ReadAgainst;
}

/** In the unit of the number, also where it is declared as a fraction. */
export const toleranceInUnit = (tolerance: number | null, scale: 'absolute' | 'ln', value: number | null): number | null =>
  tolerance === null || scale === 'absolute' ? tolerance : value === null ? null : tolerance * Math.abs(value);

const whole = (x: number): string => String(x).replace('-', '−');

/** To the digits that its U and the tolerance of the claim warrant; all of them are in its title, in the interface and in the CSV of the figures. */
export function VariedNumber({ value, u, unit, against }: VariedNumberProps) {
  const text = formatWithUncertainty(value, u, unit, against);
  if (value === null || !Number.isFinite(value)) return text;
  return <span title={`to the last digit ${whole(value)}${u === null ? '' : ` ± ${whole(u)}`} ${unitText(unit)}`.trim()}>{text}</span>;
}
