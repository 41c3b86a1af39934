import type { Mode } from '../contract/waveform';

/** Three significant digits, without trailing noise. */
export const short = (x: number, digits = 3): string => String(Number(x.toPrecision(digits)));

/** A share in per cent, such as `1.3 %`. */
export const percent = (share: number, digits = 2): string => `${short(100 * share, digits)} %`;

export const modeName = ({ l, m }: Pick<Mode, 'l' | 'm'>): string => `(${l},${String(m).replace('-', '−')})`;

/** Powers of ten as a reader writes them: 2.1×10⁻⁴; from a thousandth to ten thousand the plain number. */
export function scientific(x: number, digits = 2): string {
  if (x === 0 || (Math.abs(x) >= 1e-3 && Math.abs(x) < 1e4)) return short(x, digits);
  const [mantissa = '', power = '0'] = x.toExponential(digits - 1).split('e');
  const raised = String(Number(power)).replace(/[-\d]/g, (c) => '⁻⁰¹²³⁴⁵⁶⁷⁸⁹'['-0123456789'.indexOf(c)]!);
  return `${Number(mantissa)}×10${raised}`;
}
