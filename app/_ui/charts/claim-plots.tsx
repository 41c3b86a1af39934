import type { Figure } from '@/lib/engine/contract/measurement';
import { panelsOf } from './panels';
import { PlanePlot } from './plane/plane-plot';
import { Plot } from './plot';
import { StillPlot } from './still-plot';

interface ClaimPlotsProps {
  readonly claimId: string;
  readonly figures: readonly Figure[];
}

/** The still pictures are drawn with the page; the live ones take their place in the browser. */
export function ClaimPlots({ claimId, figures }: ClaimPlotsProps) {
  if (figures.length === 0) return null;
  return figures.map((figure, i) => (figure.plane ? (
    <PlanePlot key={i} figure={figure} plane={figure.plane} />
  ) : (
    <Plot key={i} claimId={claimId} figure={figure} stills={panelsOf(figure).map((panel, j) => <StillPlot key={j} figure={figure} panel={panel} />)} />
  )));
}
