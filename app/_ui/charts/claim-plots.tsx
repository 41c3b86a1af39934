import type { Figure } from '@/lib/engine/contract/measurement';
import { panelsOf } from './panels';
import { Plot } from './plot';
import { StillPlot } from './still-plot';

interface ClaimPlotsProps {
  readonly claimId: string;
  readonly figures: readonly Figure[];
  /** Say so when there is none; elsewhere the place is simply left out. */
  readonly empty?: boolean;
}

/** Server side of the plots: the still pictures are drawn here, the live ones take their place in the browser. */
export function ClaimPlots({ claimId, figures, empty }: ClaimPlotsProps) {
  if (figures.length === 0) return empty ? <p className="text-ui text-ink-2">No figures were kept for this run.</p> : null;
  return figures.map((figure, i) => (
    <Plot key={i} claimId={claimId} figure={figure} stills={panelsOf(figure).map((panel, j) => <StillPlot key={j} figure={figure} panel={panel} />)} />
  ));
}
