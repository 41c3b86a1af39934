'use client';
import { useRouter } from 'next/navigation';
import { useEffect, useState, type ReactNode } from 'react';
import { formatWithUncertainty } from '@/app/_ui/math/format-uncertainty';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Table } from '@/app/_ui/primitives/table';
import { formatProblem } from '@/lib/kernel/problem';
import { placeText } from '@/app/views/place-text';
import type { ResultDocument, ResultPoint } from '@/lib/pipeline/result';
import type { VariationView } from '@/lib/services/variations/variation-view';
import { requestVariation } from '../../compose/actions';
import { Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { changesInWords } from './variation-words';

interface VariationPanelProps {
  readonly submissionId: string;
  readonly claimId: string;
  /** Names of the sheet's noise curves; the built-in ones are named by their ids. */
  readonly curves: readonly string[];
  readonly unit: string;
  readonly own: readonly VariationView[];
  readonly left: number;
  readonly points: readonly ResultPoint[];
}

const isLive = (v: VariationView): boolean => v.run.state === 'queued' || v.run.state === 'running';

/** Looks again while something of one's own is still being computed, and not a moment longer. */
function useFollowUp(live: boolean) {
  const router = useRouter();
  useEffect(() => {
    if (!live) return undefined;
    const timer = setInterval(() => router.refresh(), 1500);
    return () => clearInterval(timer);
  }, [live, router]);
}

/** Band, mass, noise curve: rerun one claim with other settings, beside the official number and never in its place. */
export function VariationPanel(props: VariationPanelProps) {
  const { claimId, own, left } = props;
  useFollowUp(own.some(isLive));
  return (
    <Disclosure summary="Try other settings" open={own.length > 0}>
      <div className="grid gap-3 rounded border border-dashed border-control px-4 py-3">
        <p className="text-ui text-ink-2">A variation of {claimId}. You alone see it until you attach it to a comment; official numbers never change. {left} left today.</p>
        {left > 0 && <VariationForm {...props} />}
        {own.length > 0 && <Results {...props} />}
      </div>
    </Disclosure>
  );
}

const toNumber = (text: string): number | undefined => (text.trim() === '' ? undefined : Number(text.trim()));

function VariationForm({ submissionId, claimId, curves }: VariationPanelProps) {
  const [fields, setFields] = useState({ fLowHz: '', fHighHz: '', totalMassMsun: '', noise: '' });
  const set = (name: keyof typeof fields) => (e: { readonly target: { readonly value: string } }) => setFields({ ...fields, [name]: e.target.value });
  const { busy, trouble, run } = useAct(requestVariation);
  const submit = () => {
    const { noise, ...numbers } = fields;
    const changed = Object.fromEntries(Object.entries(numbers).map(([k, v]) => [k, toNumber(v)]).filter(([, v]) => v !== undefined));
    const curve = noise === '' ? {} : { noise: noise.startsWith('named:') ? { named: noise.slice(6) } : { curve: noise } };
    void run({ id: submissionId, variation: { claimId, changes: { ...changed, ...curve } } });
  };
  return (
    <form className="grid gap-3" onSubmit={(e) => { e.preventDefault(); submit(); }}>
      <div className="grid gap-3 sm:grid-cols-4">
        <TextField label="Lower edge, Hz" inputMode="decimal" value={fields.fLowHz} onChange={set('fLowHz')} />
        <TextField label="Upper edge, Hz" inputMode="decimal" value={fields.fHighHz} onChange={set('fHighHz')} />
        <TextField label="Total mass, M⊙" inputMode="decimal" value={fields.totalMassMsun} onChange={set('totalMassMsun')} />
        <SelectField label="Noise curve" value={fields.noise} onChange={set('noise')}>
          <option value="">as declared</option>
          {curves.map((name) => <option key={name} value={`named:${name}`}>{name}, from the sheet</option>)}
          {BUILT_IN.map((id) => <option key={id} value={id}>{id}, built in</option>)}
        </SelectField>
      </div>
      <div><Button type="submit" size="low" busy={busy ? 'Asking for it' : null}>Compute the variation</Button></div>
      <Trouble trouble={trouble} />
    </form>
  );
}

/** Ids of the built-in curves, as `domain` names them; the server refuses others with a sentence. */
const BUILT_IN = ['G2', 'G1', 'G1b', 'A1', 'A2', 'A3', 'A4'] as const;

function Results({ own, unit, points }: VariationPanelProps) {
  const official = points.length === 1 && points[0] ? formatWithUncertainty(points[0].value, points[0].expandedUncertainty, unit) : null;
  return (
    <Table caption="Your variations of this claim">
      <thead><tr><th scope="col">Changed</th><th scope="col">Result</th></tr></thead>
      <tbody>
        {official && <tr><th scope="row">nothing: the official number</th><td>{official}</td></tr>}
        {own.map((v) => <tr key={v.id}><th scope="row" className="font-normal">{changesInWords(v.changes)}</th><td>{outcome(v, unit)}</td></tr>)}
      </tbody>
    </Table>
  );
}

function outcome({ run }: VariationView, unit: string): ReactNode {
  switch (run.state) {
    case 'queued': return 'waiting for a worker';
    case 'running': return `${Math.round(run.fraction * 100)} %${run.doing ? `, ${run.doing}` : ''}`;
    case 'stopped': return run.because;
    case 'refused': return run.problems.map(formatProblem).join(' ');
    case 'measured': return <Measured result={run.result} unit={unit} />;
  }
}

/** One line a point, with its place on the sweep; where nothing could be computed, what stopped it. */
function Measured({ result, unit }: { readonly result: ResultDocument; readonly unit: string }) {
  const lines = result.claims.flatMap((claim) =>
    claim.points.map((p) => {
      const place = claim.points.length > 1 ? `${placeText(p.at)}: ` : '';
      const stops = p.value === null ? `: ${claim.findings.filter((f) => f.level === 'stops-lodging').map((f) => f.text).join(' ')}` : '';
      return place + formatWithUncertainty(p.value, p.expandedUncertainty, unit) + stops;
    }),
  );
  return lines.map((line) => <p key={line}>{line}</p>);
}
