export type Theme = 'system' | 'light' | 'dark';
export const themeCookie = 'theme';
export const parseTheme = (value: string | undefined): Theme => (value === 'light' || value === 'dark' ? value : 'system');
