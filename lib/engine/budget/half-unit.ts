/** Half a unit of the last digit of a number as it is usually printed; the zeros that end a whole number are taken as digits. */
export function halfUnit(x: number): number {
  const [mantissa = '', exponent = '0'] = x.toString().split('e');
  return 0.5 * 10 ** (Number(exponent) - (mantissa.split('.')[1]?.length ?? 0));
}
