import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { cache } from 'react';
import { RecordPage } from '@/app/_ui/claim/record-page';
import { recordAsView } from '@/app/views/record-as-view';
import { loadActor, orNotFound } from '@/lib/http/page-guard';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { getRecord } from '@/lib/services/records/get-record';
import { getPublic } from '@/lib/services/submissions/get-lodged';
import type { LodgedView } from '@/lib/services/submissions/submission-view';
import { listVariations } from '@/lib/services/variations/list-variations';
import { askedVariation, type VariationQuery } from '../../variations/asked-variation';
import { variationSlot } from '../../variations/variation-slot';
import { BadgeCard, RecordActions } from './record-aside';

interface RecordProps {
  readonly params: Promise<{ readonly id: string }>;
  readonly searchParams: Promise<VariationQuery>;
}

/** Asked by the head and by the body of the page, read once. */
const readRecord = cache(async (id: string) => getRecord(await loadActor(), id));

export async function generateMetadata({ params }: RecordProps): Promise<Metadata> {
  const { id } = await params;
  const record = await readRecord(id);
  if (!record.ok) return { title: 'Nothing here' };
  const { links, document } = record.value;
  return { title: document.title, alternates: { types: { 'application/json': links.json, 'image/svg+xml': links.badge } } };
}

/** The statement lies with the submission; the record stands without it, should it be out of reach. */
async function loadBehind(actor: Actor, submissionId: string, revision: number) {
  const lodged = await getPublic(actor, submissionId, revision);
  return lodged.ok ? lodged.value : null;
}

/** A visitor comes back to the very claim. */
const signInToVary = (id: string) =>
  function action(claimId: string) {
    return <Link href={`/sign-in?next=${encodeURIComponent(`/records/${id}?vary=${encodeURIComponent(claimId)}`)}` as Route} className="inline-flex min-h-8 items-center text-ui">Sign in to vary a setting</Link>;
  };

/** Signed-in readers vary the official run of the revision that was entered. */
async function variationsOf(actor: Actor, lodged: LodgedView | null) {
  const list = lodged?.may.vary && isSignedIn(actor) ? await listVariations(actor, lodged.id, lodged.revision.number) : null;
  return list?.ok ? list.value : null;
}

export default async function PublishedRecordPage({ params, searchParams }: RecordProps) {
  const { id } = await params;
  const record = orNotFound(await readRecord(id));
  const asked = askedVariation(await searchParams);
  const actor = await loadActor();
  const lodged = await loadBehind(actor, record.submissionId, record.document.revision);
  const variations = await variationsOf(actor, lodged);
  const varied = lodged && variations && variationSlot({ revision: { submissionId: lodged.id, revision: lodged.revision.number, sheet: lodged.revision.sheet }, result: lodged.run?.state === 'measured' ? lodged.run.result : null, variations, asked });
  const action = varied ?? (isSignedIn(actor) ? undefined : signInToVary(id));
  const slots = { actions: <RecordActions record={record} />, aside: <BadgeCard record={record} />, ...(action && { action }) };
  return <RecordPage view={{ ...recordAsView(record, lodged), address: `${record.document.domain}/records/${record.id}` }} trail={{ href: '/register', label: 'Register' }} slots={slots} open={asked ? [asked.claimId] : undefined} />;
}
