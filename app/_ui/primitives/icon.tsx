import { classes } from './classes';

const strokes = {
  open: 'M5.5 3l5 5-5 5',
  down: 'M8 2v8M4.5 7L8 10.5 11.5 7M2.5 13.5h11',
  search: 'M10.5 10.5l4 4M7 2.200a4.800 4.800 0 1 0 0 9.600a4.800 4.800 0 1 0 0 -9.600',
  lock: 'M3 7.200h10V14H3zM5 7V4.800a3 3 0 0 1 6 0V7',
  close: 'M3 3l10 10M13 3L3 13',
  add: 'M8 2.500v11M2.500 8h11',
  menu: 'M2 4h12M2 8h12M2 12h12',
  copy: 'M5.500 5.500h8v8h-8zM10.500 5.500v-3h-8v8h3',
  thread: 'M2 2.500h12v8.500H7.500L4 14v-3H2z',
  person: 'M8 2.200a2.800 2.800 0 1 0 0 5.600a2.800 2.800 0 1 0 0 -5.600M2.500 14c0-3 2.400-4.500 5.500-4.500s5.500 1.500 5.500 4.500',
  half: 'M8 2a6 6 0 1 0 0 12a6 6 0 1 0 0 -12',
  identifier: 'M8 .8a7.200 7.200 0 1 0 0 14.400a7.200 7.200 0 1 0 0 -14.400M5 5.200v5.600M8 5.300v5.400h1.200a2.700 2.700 0 0 0 0-5.400z',
} as const;
export type IconName = keyof typeof strokes;

/** Decoration beside a word, unless a label makes it speak for itself. */
export function Icon({ name, label, className }: { readonly name: IconName; readonly label?: string; readonly className?: string }) {
  return (
    <svg viewBox="0 0 16 16" className={classes('size-4', className)} fill="none" stroke="currentColor" strokeWidth="1.6" focusable="false" {...(label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true })}>
      <path d={strokes[name]} />
      {name === 'half' && <path fill="currentColor" stroke="none" d="M8 2a6 6 0 0 1 0 12z" />}
    </svg>
  );
}
