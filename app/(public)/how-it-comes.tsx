import Link from 'next/link';
import { Perforation } from '../_ui/primitives/perforation';
import { VerdictChip } from '../_ui/verdict/verdict-chip';
import { VerdictShape } from '../_ui/verdict/verdict-shape';

const step = 'relative sm:pl-6 sm:first:pl-0 stack:pr-6 sm:not-first:shadow-[inset_1px_0_var(--hair-2)] max-sm:pl-3.5 max-sm:shadow-[inset_1px_0_var(--hair-2)]';

/** Four steps, each with who takes it. */
export function HowARecordComesToBe() {
  return (
    <section className="bg-sheet py-10 shadow-[inset_0_1px_var(--hair-2),inset_0_-1px_var(--hair-2)]" aria-labelledby="how">
      <div className="wrap">
        <h2 id="how">How a record comes to be</h2>
        <ol className="mt-6 grid gap-y-6 sm:grid-cols-2 stack:grid-cols-4">
          <Step who="Author" does="Lodge">State each number as a claim of its own, with its tolerance. Attach the waveforms and the noise curve. Declare the settings; what you leave out is marked as assumed.</Step>
          <Step who="Machine" does="Recompute" example={<><VerdictChip state="agrees" /><VerdictChip state="differs" /><VerdictChip state="unsettled" /></>}>
            Two routes that share no transform, grid or interpolation run on the same files. Each value comes with the uncertainty <i>U</i> of the computation alone. What was chosen, or is not known from the files, is listed beside it with its size; a missing part is never shown as zero.
          </Step>
          <Step who="Referees" does="Question">A referee comments on the very number, reruns it with other settings, and reports. Authors answer where the question stands, and revise.</Step>
          <Step who="Editor" does="Enter">Only the editor enters a record in the register. It is signed, anyone can check it without asking us, and the badge lapses when it stops being true.</Step>
        </ol>
      </div>
    </section>
  );
}

function Step({ who, does, example, children }: { readonly who: string; readonly does: string; readonly example?: React.ReactNode; readonly children: React.ReactNode }) {
  return (
    <li className={step}>
      <p className="text-small font-semibold text-ink-2">{who}</p>
      <h3 className="mt-0.5 mb-2 text-[20px]/[28px]">{does}</h3>
      <p className="text-cell text-ink-2">{children}</p>
      {example && <p className="mt-3 flex flex-wrap gap-2">{example}</p>}
    </li>
  );
}

const says = [
  'This number follows from these files and these settings.',
  'It does so within this tolerance, by two routes, in this version of the engine.',
  'Referees looked at it, and an editor with a name signed the entry.',
  'It held when last rerun; the date stands beside it.',
];
const saysNot = [
  'That the simulation solves the right equations accurately.',
  'That the noise curve is the detector’s, or that the source exists.',
  'That the conclusion drawn from the number is right.',
  'That a second, independent simulation agrees. Only the remark second data set says so.',
];

/** What verified means, and what it does not: the two halves of a promise. */
export function WhatVerifiedMeans() {
  return (
    <section className="wrap pt-16" aria-labelledby="means">
      <h2 id="means">What <i>verified</i> means here, and what it does not</h2>
      <div className="halves halves-even mt-4">
        <div><h3 className="mb-2.5">It says</h3><Points points={says} shape="agrees" /></div>
        <Perforation />
        <div><h3 className="mb-2.5">It does not say</h3><Points points={saysNot} shape="not-computable" /></div>
      </div>
      <p className="mt-3 max-w-measure text-small text-ink-2">Whether a record counts for a publication is decided by the rules of your journal or collaboration, not by this service. Where each word is exact: <Link href="/methods">how a verdict is made</Link>, <Link href="/methods/house-conventions">house conventions</Link>, <Link href="/methods/glossary">glossary</Link>.</p>
    </section>
  );
}

const Points = ({ points, shape }: { readonly points: readonly string[]; readonly shape: 'agrees' | 'not-computable' }) => (
  <ul>
    {points.map((point) => (
      <li key={point} className="relative py-2 pl-7 font-serif not-first:shadow-[inset_0_1px_var(--hair-2)]">
        <VerdictShape state={shape} className={`absolute top-3 left-0 size-4 ${shape === 'agrees' ? 'text-agrees' : 'text-ink-2'}`} />
        {point}
      </li>
    ))}
  </ul>
);
