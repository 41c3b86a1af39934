'use client';
import type { Figure } from '@/lib/engine/contract/measurement';
import { formatNumber } from '../math/format-number';
import { unitText } from '../math/units';
import { Button } from '../primitives/button';
import { say } from '../primitives/toaster';
import { fileNameOf, type FigureOrigin } from './export/figure-words';
import { useFigureOrigin } from './export/figure-origin';
import { saveFigure, type SavedAs } from './export/save-figure';
import type { Range } from './zoom';

interface PlotToolsProps {
  readonly figure: Figure;
  readonly range: Range | null;
  readonly onZoom: (factor: number) => void;
  readonly onReset: () => void;
}

const formats: readonly { readonly as: SavedAs; readonly word: string; readonly says: string }[] = [
  { as: 'svg', word: 'SVG', says: 'the plot as SVG' },
  { as: 'png', word: 'PNG', says: 'the plot as PNG' },
  { as: 'csv', word: 'CSV', says: 'its data as CSV' },
];

async function save(as: SavedAs, figure: Figure, origin: FigureOrigin, range: Range | null) {
  try {
    await saveFigure(as, { figure, origin, range });
    say(`Saved ${fileNameOf(figure, origin, as)}.`);
  } catch {
    say(as === 'png' ? 'The browser did not draw the picture. Save it as SVG instead.' : 'The browser did not let the page save a file.');
  }
}

/** The ways to take a figure home; none where no claim owns it. */
export function Saves({ figure, range }: { readonly figure: Figure; readonly range: Range | null }) {
  const origin = useFigureOrigin();
  return origin && (
    <span role="group" aria-label={`Save “${figure.title}”`} className="flex flex-wrap items-center">
      <span className="mr-1 text-ink-2">{formatNumber(figure.plane?.level.values.length ?? figure.x.values.length)} points. Save:</span>
      {formats.map(({ as, word, says }) => (
        <Button key={as} tone="quiet" size="low" aria-label={`Save ${says}: ${figure.title}`} onClick={() => void save(as, figure, origin, range)}>{word}</Button>
      ))}
    </span>
  );
}

const brief = (value: number): string => formatNumber(Number(value.toPrecision(4)));

/** Beneath a plot: nearer, farther, whole, and the ways to take it home. */
export function PlotTools({ figure, range, onZoom, onReset }: PlotToolsProps) {
  const part = range ? `${brief(range[0])} to ${brief(range[1])} ${unitText(figure.x.unit)}`.trim() : 'whole axis';
  return (
    <div className="-mx-2 flex flex-wrap items-center justify-between gap-x-3">
      <span role="group" aria-label={`View of “${figure.title}”`} className="flex flex-wrap items-center gap-1">
        <Button tone="quiet" size="low" aria-label={`Zoom in on ${figure.title}`} onClick={() => onZoom(0.5)}>Zoom in</Button>
        <Button tone="quiet" size="low" aria-label={`Zoom out of ${figure.title}`} aria-disabled={range === null} onClick={() => { if (range) onZoom(2); }}>Zoom out</Button>
        <Button tone="quiet" size="low" aria-label={`Reset the view of ${figure.title}`} aria-disabled={range === null} onClick={() => { if (range) onReset(); }}>Reset</Button>
        <output className="ml-1 text-ink-2">{part}</output>
      </span>
      <Saves figure={figure} range={range} />
    </div>
  );
}
