import type { Metadata } from 'next';
import { cache } from 'react';
import { RecordPage } from '@/app/_ui/claim/record-page';
import { recordAsView } from '@/app/views/record-as-view';
import { loadActor, orNotFound } from '@/lib/http/page-guard';
import type { Actor } from '@/lib/policy/actor';
import { getRecord } from '@/lib/services/records/get-record';
import { getPublic } from '@/lib/services/submissions/get-lodged';
import { BadgeCard, RecordActions } from './record-aside';

interface RecordProps {
  readonly params: Promise<{ readonly id: string }>;
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

export default async function PublishedRecordPage({ params }: RecordProps) {
  const { id } = await params;
  const record = orNotFound(await readRecord(id));
  const lodged = await loadBehind(await loadActor(), record.submissionId, record.document.revision);
  const slots = { actions: <RecordActions record={record} />, aside: <BadgeCard record={record} /> };
  return <RecordPage view={{ ...recordAsView(record, lodged), address: `${record.document.domain}/records/${record.id}` }} trail={{ href: '/register', label: 'Register' }} slots={slots} />;
}
