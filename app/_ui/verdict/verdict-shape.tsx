import type { ReactNode } from 'react';
import { classes } from '../primitives/classes';
import type { VerdictState } from './verdict-words';

const line = { fill: 'none', stroke: 'currentColor' } as const;

/** Halves joined, wave, halves offset, dashed box, dotted ring, a fork for routes that part. */
const shapes: Record<VerdictState, ReactNode> = {
  agrees: <><path fill="currentColor" d="M1 3h6v2.6L9.6 8 7 10.4V13H1z" /><path {...line} strokeWidth="1.5" d="M1.75 3.75h12.500v8.500H1.750z" /></>,
  differs: <><path fill="currentColor" d="M.5 1h5.200v2.400L8.200 5.700 5.700 8v2.300H.5z" /><path {...line} strokeWidth="1.5" d="M8.600 6.400h6.600v8.200H8.600v-1.900l2.300-2.200-2.300-2.200z" /></>,
  unsettled: <path {...line} strokeWidth="2.2" strokeLinecap="round" d="M1.500 10C3.300 5 5.700 4.600 8 8s4.700 3 6.500-2" />,
  'not-computable': <path {...line} strokeWidth="1.6" strokeDasharray="3 2" d="M1.800 3h12.400v10H1.800z" />,
  'routes-disagree': <path {...line} strokeWidth="1.8" strokeLinecap="round" d="M1.500 8h4l8.500-5M5.500 8l8.500 5" />,
  waiting: <circle cx="8" cy="8" r="5.8" {...line} strokeWidth="2.2" strokeLinecap="round" strokeDasharray=".01 4.555" />,
};

export const VerdictShape = ({ state, className }: { readonly state: VerdictState; readonly className?: string }) => (
  <svg viewBox="0 0 16 16" aria-hidden="true" focusable="false" className={classes('size-4', className)}>{shapes[state]}</svg>
);
