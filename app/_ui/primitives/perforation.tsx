import { classes } from './classes';

/** The only ornament. `turn` lies down where the halves stack, `across` always lies. */
export const Perforation = ({ lies = 'turn' }: { readonly lies?: 'never' | 'turn' | 'across' }) => (
  <div aria-hidden className={classes('perf', lies === 'turn' && 'perf-turn', lies === 'across' && 'perf-across')} />
);
