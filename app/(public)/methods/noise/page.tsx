import type { Metadata } from 'next';
import Link from 'next/link';
import { ClaimPlots } from '@/app/_ui/charts/claim-plots';
import { LinkedPlots } from '@/app/_ui/charts/linked-plots';
import { Formula } from '@/app/_ui/math/formula';
import { NumberCell } from '@/app/_ui/math/number-cell';
import { Table } from '@/app/_ui/primitives/table';
import { builtInCurves, type BuiltInCurve } from '@/lib/engine/noise/built-in-curves';
import { PageContents } from '../page-contents';
import { Trail } from '../trail';
import { curveFigure } from './curve-figure';

export const metadata: Metadata = { title: 'Noise curves', description: 'The built-in noise curves: equation, source, range and plot of each.' };

export default function NoiseCurves() {
  return (
    <div className="wrap pt-10">
      <Trail here="noise curves" />
      <div className="grid gap-x-16 gap-y-6 mid:grid-cols-[minmax(0,1fr)_240px]">
        <article className="min-w-0">
          <h1>Noise curves</h1>
          <div className="prose mt-3">
            <p>A sheet names one of these by its id, or attaches a curve of its own. Each is a closed form from a publication; the engine evaluates it at every frequency it needs and tabulates nothing. All are one-sided power densities <i>S</i>(<i>f</i>) in 1/Hz; the plots show √<i>S</i>. Outside the stated range there is no curve, and a band that reaches beyond it stops the claim.</p>
            <p>An attached curve that is named after one of these, or lies close to one, is compared with it over octaves. Where they part, the author is asked: a curve typed by hand may carry a slipped digit. A closed form is a fit. The detector as it was on the day of an observation is another thing, and no curve here stands for it.</p>
          </div>
          {builtInCurves.map((curve) => <Curve key={curve.id} curve={curve} />)}
        </article>
        <div className="max-mid:order-first"><PageContents entries={builtInCurves.map(({ id, title }) => ({ id, label: `${id}: ${title}` }))} /></div>
      </div>
    </div>
  );
}

const digitsOf = (hz: number): number => hz.toExponential().replace(/e.*/, '').replace('.', '').length;
const Hz = ({ value }: { readonly value: number }) => <NumberCell value={value} significant={digitsOf(value)} unit="Hz" />;

function Curve({ curve }: { readonly curve: BuiltInCurve }) {
  const { id, title, formula, source, obtained, rangeNote, fLowHz, fHighHz, alreadyAveraged } = curve;
  return (
    <section aria-labelledby={id} className="mt-10">
      <h2 id={id} className="scroll-mt-6">{title} <code className="font-code text-code font-normal text-ink-2">{id}</code></h2>
      <div className="mt-3 overflow-x-auto" tabIndex={0} role="group" aria-label={`Equation of ${id}`}><Formula display label={`Power spectral density of ${id}`} tex={`S(f)=${formula}`} /></div>
      <Table caption={`Where ${id} comes from and where it holds`} className="mt-3">
        <tbody>
          <tr><th scope="row" className="w-40">Source</th><td>{source}</td></tr>
          <tr><th scope="row">How it reached us</th><td>{obtained}</td></tr>
          <tr><th scope="row">Range</th><td><Hz value={fLowHz} /> to <Hz value={fHighHz} />; {rangeNote}</td></tr>
          <tr><th scope="row">Averages</th><td>{alreadyAveraged ? <>Averaged over the sky already: an average asked for beside it stops the claim. See <Link href="/methods/conventions#C15">averages</Link>.</> : 'That of one optimally placed detector; averages are settings of the claim.'}</td></tr>
        </tbody>
      </Table>
      <LinkedPlots origin={{ source: `Counterfoil, built-in noise curve ${id}`, stem: 'counterfoil-noise', claimId: id, quantity: title, place: null }}>
        <div className="mt-4"><ClaimPlots claimId={id} figures={[curveFigure(curve)]} /></div>
      </LinkedPlots>
    </section>
  );
}
