import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { ClaimPlots } from '@/app/_ui/charts/claim-plots';
import { LinkedPlots } from '@/app/_ui/charts/linked-plots';
import { Card } from '@/app/_ui/primitives/card';
import { Facts } from '@/app/_ui/primitives/facts';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { FindingItem } from '@/app/_ui/claim/finding-item';
import { quantities } from '@/lib/engine/quantities/registry';
import { loadActor, orNotFound } from '@/lib/http/page-guard';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import type { ResultClaim } from '@/lib/pipeline/result';
import { getFigures } from '@/lib/services/runs/list-runs';
import { getVariation } from '@/lib/services/variations/get-variation';
import type { VariationPage } from '@/lib/services/variations/variation-view';
import { askedAgain } from '@/lib/services/variations/changes';
import { askingQuery } from '../asked-variation';
import { ChangedTable } from '../changed-table';
import { comparePoints } from '../compare';
import { ComparedTable } from '../compared-table';
import { LinkSharing } from '../link-sharing';
import { overlayFigures, pointOnSweep } from '../overlay';
import { RunStanding } from '../run-standing';

export const metadata: Metadata = { title: 'Variation', robots: { index: false } };

interface PageProps {
  readonly params: Promise<{ readonly id: string }>;
}

/** A visitor is asked to sign in, whatever the id: the link may be a referee's own, or of a record. */
async function load(id: string): Promise<{ readonly actor: Actor; readonly variation: VariationPage }> {
  const actor = await loadActor();
  const found = await getVariation(actor, id);
  if (!found.ok && !isSignedIn(actor)) redirect(`/sign-in?next=${encodeURIComponent(`/variations/${id}`)}`);
  return { actor, variation: orNotFound(found) };
}

async function figuresOf(actor: Actor, variation: VariationPage) {
  const { submissionId, runId, officialRunId, claimId, run } = variation;
  if (run.state !== 'measured') return null;
  const [official, varied] = [await getFigures(actor, submissionId, officialRunId), await getFigures(actor, submissionId, runId)];
  const [below, above] = [official, varied].map((found) => (found.ok ? (found.value.figures[claimId] ?? []) : []));
  const points = comparePoints(variation.official, run.claim, variation.changes, 'absolute');
  return overlayFigures(below ?? [], [...(above ?? []), ...(above?.some(({ kind }) => kind === 'sweep') ? [] : pointOnSweep(below ?? [], points))]);
}

/** Back to the claim, where this reader finds it, and on to one that begins with the same changes. */
function wayBack({ from, claimId }: Pick<VariationPage, 'from' | 'claimId'>): { readonly href: string; readonly label: string } {
  const places = { draft: ['/compose', 'Composer'], submission: ['/submissions', 'Submission'], review: ['/review', 'Review'], record: ['/records', 'Record'] } as const;
  const [path, label] = places[from.kind];
  return { href: `${path}/${from.id}?open=${encodeURIComponent(claimId)}#${encodeURIComponent(claimId)}`, label };
}

/** Says of readings that they are readings: the engine did what the words say, not what the authors declared. */
function withWhat({ settings, noise, readings, mask }: VariationPage['changes']): string {
  const parts = [...(settings || noise ? ['with other settings'] : []), ...(readings ? ['with its inputs or its number read otherwise'] : []), ...(mask ? ['with a stretch of time left out'] : [])];
  return parts.length > 1 ? `${parts.slice(0, -1).join(', ')} and ${parts.at(-1) ?? ''}` : (parts[0] ?? 'with other settings');
}

function Head({ variation }: { readonly variation: VariationPage }) {
  const { claimId, official, title, revision, ofDraft } = variation;
  const back = wayBack(variation);
  return (
    <header className="pt-10 pb-6">
      <p className="mb-2 flex flex-wrap items-center gap-x-2.5 gap-y-1 text-ui text-ink-2"><Link href={back.href as Route} className="inline-flex min-h-8 items-center">{back.label}</Link><span aria-hidden>/</span><span>Variation of {claimId}</span></p>
      <h1>{claimId}, {quantities.get(official.quantity)?.title ?? official.quantity}, varied</h1>
      <p className="mt-2 max-w-[68ch] text-ink-2">A rerun of one claim of “{title || 'Untitled'}”, {ofDraft ? `draft of revision ${revision}` : `revision ${revision}`}, {withWhat(variation.changes)}. It is never official, and no verdict hangs on it.</p>
    </header>
  );
}

const measured = ({ run }: VariationPage): ResultClaim | null => (run.state === 'measured' ? run.claim : null);

function Findings({ variation }: { readonly variation: VariationPage }) {
  const own = (measured(variation)?.findings ?? []).filter((f) => !variation.official.findings.some((o) => o.code === f.code && o.text === f.text));
  if (own.length === 0) return null;
  return <section aria-labelledby="findings-h"><h2 id="findings-h" className="mb-2 text-h3">Findings of this rerun alone</h2>{own.map((finding, i) => <FindingItem key={i} finding={finding} answer={null} />)}</section>;
}

function Aside({ variation }: { readonly variation: VariationPage }) {
  const { revision, ofDraft, engine, officialEngine, note } = variation;
  return (
    <aside aria-label="About this variation" className="grid min-w-0 content-start gap-4">
      <Card title="What it stands on"><Facts facts={[['Base', ofDraft ? `draft of revision ${revision}` : `revision ${revision}`], ['Engine', engine], ...(engine === officialEngine ? [] : [['Engine of the official number', officialEngine] as const])]} /></Card>
      {note && <Card title="Note"><p className="text-ui whitespace-pre-wrap [overflow-wrap:anywhere]">{note}</p></Card>}
      <Card title="Who sees it"><LinkSharing variation={variation} /></Card>
    </aside>
  );
}

/** The address of exactly this view. */
export default async function OneVariation({ params }: PageProps) {
  const { actor, variation } = await load((await params).id);
  const figures = await figuresOf(actor, variation);
  const { claimId, official, changes, run, ofDraft } = variation;
  const scale = quantities.get(official.quantity)?.scale ?? 'absolute';
  const varied = measured(variation);
  const word = ofDraft ? 'checked' : 'official';
  return (
    <div className="wrap pb-16">
      <Head variation={variation} />
      <div className="grid grid-cols-1 gap-10 mid:grid-cols-[minmax(0,1fr)_340px]">
        <div className="grid min-w-0 grid-cols-1 content-start gap-8">
          {run.state !== 'measured' && <RunStanding submissionId={variation.submissionId} runId={variation.runId} run={run} follow={variation.yours} />}
          <section aria-labelledby="numbers-h"><h2 id="numbers-h" className="mb-2 text-h3">The number</h2>
            <ComparedTable claimId={claimId} points={comparePoints(official, varied, changes, scale)} unit={official.unit} scale={scale} officialWord={word} waiting={varied ? null : run.state === 'queued' || run.state === 'running' ? 'to come' : 'none'} />
            <p className="mt-2 max-w-[68ch] text-small text-ink-2">Apart by = varied − {word}. <i>T</i> is the tolerance of the claim, <i>U</i> the expanded uncertainty of each computation alone.</p>
          </section>
          <section aria-labelledby="changed-h"><h2 id="changed-h" className="mb-2 text-h3">What was changed</h2><ChangedTable claimId={claimId} changes={changes} official={official.settings} varied={varied?.settings ?? null} /></section>
          <Findings variation={variation} />
          {figures && <Plots claimId={claimId} variation={variation} figures={figures} />}
          {isSignedIn(actor) && <div><LinkButton href={againHref(variation)}>Vary it further</LinkButton></div>}
        </div>
        <Aside variation={variation} />
      </div>
    </div>
  );
}

function Plots({ claimId, variation, figures }: { readonly claimId: string; readonly variation: VariationPage; readonly figures: NonNullable<Awaited<ReturnType<typeof figuresOf>>> }) {
  return (
    <section aria-labelledby="plots-h" className="min-w-0">
      <h2 id="plots-h" className="mb-2 text-h3">Plots of both</h2>
      {figures.length === 0 && <p className="text-ui text-ink-2">No figures were kept for these runs.</p>}
      <LinkedPlots origin={{ source: `Counterfoil variation ${variation.id}, not official`, stem: `counterfoil-variation-${variation.id.slice(0, 8)}`, claimId, quantity: quantities.get(variation.official.quantity)?.title ?? variation.official.quantity, place: null }}>
        <div className="grid min-w-0 gap-8"><ClaimPlots claimId={claimId} figures={figures} /></div>
      </LinkedPlots>
    </section>
  );
}

/** The claim again, its form filled with these changes. */
function againHref({ from, claimId, changes }: VariationPage): string {
  const { href } = wayBack({ from, claimId });
  const [path = '', hash = ''] = href.split('#');
  const query = askingQuery(claimId, askedAgain(changes));
  return `${path}&${query.toString()}#${hash}`;
}
