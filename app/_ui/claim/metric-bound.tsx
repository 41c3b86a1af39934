import type { ResultClaim } from '@/lib/pipeline/result';
import { NumberCell, Unknown } from '../math/number-cell';

type Bound = NonNullable<ResultClaim['metricBound']>;

function End({ value, unit }: { readonly value: number | null; readonly unit: string }) {
  return value === null ? <Unknown>open</Unknown> : <NumberCell value={value} significant={5} unit={unit} />;
}

const Missing = ({ missing }: { readonly missing: readonly string[] }) => (missing.length === 0 ? null : <> Not known from the files: {missing.join(', ')}; the bound can only be wider.</>);

/** What two waveforms that are themselves known only to a mismatch can say of their own: printed beside every claim of the kind. */
export function MetricBoundLine({ bound, unit }: { readonly bound: Bound; readonly unit: string }) {
  if (bound.knownTo.length === 0) {
    return <p className="text-ui"><Unknown>not available, not zero</Unknown> None of the waveforms comes with another resolution or radius, so nothing bounds how well they are known.</p>;
  }
  return (
    <div className="text-ui">
      <p>
        Between <b><End value={bound.low} unit={unit} /></b> and <b><End value={bound.high} unit={unit} /></b>: no two waveforms known this well can tell more. A bound, not a standard uncertainty.
        <Missing missing={bound.missing} />
      </p>
      <ul className="mt-1 list-disc pl-5">
        {bound.knownTo.map(({ waveform, relative, by, mismatch }, i) => (
          <li key={i}>{waveform} and {relative}, which differ in {by}, have a mismatch of <NumberCell value={mismatch} significant={2} /></li>
        ))}
      </ul>
    </div>
  );
}
