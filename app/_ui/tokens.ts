/**
 * Drawing only. This room turns values into marks on a screen: it knows the domain's types
 * and their formatters, and nothing of sessions, services or the database.
 *
 * The tokens are the one source of every colour: the Tailwind theme, the base styles, the
 * plots and the contrast test all read them here.
 */
export interface Palette {
  readonly page: string;
  readonly sheet: string;
  readonly 'claimed-side': string;
  readonly ink: string;
  readonly 'ink-2': string;
  readonly control: string;
  readonly link: string;
  readonly 'on-link': string;
  readonly focus: string;
  readonly hair: string;
  readonly 'hair-2': string;
  readonly hover: string;
  readonly agrees: string;
  readonly 'agrees-tint': string;
  readonly unsettled: string;
  readonly 'unsettled-tint': string;
  readonly differs: string;
  readonly 'differs-tint': string;
  readonly notcomp: string;
  readonly waiting: string;
  readonly 'trace-claimed': string;
  readonly 'trace-recomputed': string;
  readonly 'trace-candidate': string;
  readonly band: string;
  readonly veil: string;
}
export type TokenName = keyof Palette;

export const light: Palette = {
  page: '#FBFAF6',
  sheet: '#FFFFFF',
  'claimed-side': '#EEF2EA',
  ink: '#1B2430',
  'ink-2': '#4A5563',
  control: '#7C8794',
  link: '#1F4E79',
  'on-link': '#FFFFFF',
  focus: '#0B57D0',
  hair: '#DADFD6',
  'hair-2': '#BEC6BF',
  hover: '#F3F5EF',
  agrees: '#17708A',
  'agrees-tint': '#E1F1F5',
  unsettled: '#8A640C',
  'unsettled-tint': '#F8EED6',
  differs: '#6B0F22',
  'differs-tint': '#F8E3E6',
  notcomp: '#4B5563',
  waiting: '#2B4C9B',
  'trace-claimed': '#B4530A',
  'trace-recomputed': '#1B6CA8',
  'trace-candidate': '#5A6472',
  band: '#1B6CA833',
  veil: '#1B243059',
};

export const dark: Palette = {
  page: '#12171E',
  sheet: '#1A212B',
  'claimed-side': '#151B23',
  ink: '#E9ECEF',
  'ink-2': '#AEB8C4',
  control: '#7F8B99',
  link: '#8DBBE8',
  'on-link': '#12171E',
  focus: '#9CC7FF',
  hair: '#2B3541',
  'hair-2': '#3C4855',
  hover: '#202935',
  agrees: '#63E0E6',
  'agrees-tint': '#0F2C33',
  unsettled: '#EBCF86',
  'unsettled-tint': '#33290F',
  differs: '#F3618B',
  'differs-tint': '#3A1522',
  notcomp: '#B3BDC9',
  waiting: '#9DB8FF',
  'trace-claimed': '#FFB066',
  'trace-recomputed': '#7CC0F5',
  'trace-candidate': '#AEB8C4',
  band: '#7CC0F540',
  veil: '#05080CB3',
};

export const tokenNames = Object.keys(light) as readonly TokenName[];

/** `{ '--ink': '#…' }`: the shape a style rule wants. */
export const asCustomProperties = (palette: Palette): Record<string, string> =>
  Object.fromEntries(tokenNames.map((name) => [`--${name}`, palette[name]]));
