import { scientific } from '../findings/spelt';

/** A number in the note of a line, with a true minus sign. */
export const numeral = (x: number, digits = 2): string => scientific(x, digits).replace('-', '−');

/** The same in the quantity's unit; of a number without unit the bare number. */
export const withUnit = (x: number, unit: string, digits = 2): string => (unit === '' ? numeral(x, digits) : `${numeral(x, digits)} ${unit}`);
