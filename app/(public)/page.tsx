import type { Metadata } from 'next';
import { LinkButton } from '../_ui/primitives/link-button';
import { loadActor, orNotFound } from '@/lib/http/page-guard';
import { listRecords } from '@/lib/services/records/list-records';
import { HowARecordComesToBe, WhatVerifiedMeans } from './how-it-comes';
import { NewestRecord, NewestRecords } from './newest-records';

export const metadata: Metadata = { title: { absolute: 'Counterfoil: every number has two halves' } };

export default async function Landing() {
  const actor = await loadActor();
  const rows = orNotFound(await listRecords(actor));
  return (
    <>
      <div className="wrap py-8 stack:py-14">
        <div className="mb-10 grid items-end gap-x-6 gap-y-4 stack:grid-cols-[43fr_57fr]">
          <h1 className="max-w-[9.5em] text-[32px]/[40px] tracking-[-0.02em] stack:text-hero">Every number has two halves</h1>
          <div className="stack:pl-[22px]">
            <p className="max-w-[62ch] font-serif text-lead text-ink-2">
              The half its authors claim, and the half this server recomputes from their own waveform files by two independent routes. Counterfoil sets them side by side, says by how much they part and why, and enters the record once referees and an editor have read it.
            </p>
            <div className="mt-6 flex flex-wrap gap-3">
              <LinkButton href="/compose" tone="main" size="tall">Lodge a claim</LinkButton>
              <LinkButton href="/register" size="tall">Read the register</LinkButton>
            </div>
          </div>
        </div>
        <NewestRecord actor={actor} row={rows.find((row) => row.standing === 'entered')} />
      </div>
      <HowARecordComesToBe />
      <NewestRecords rows={rows.slice(0, 5)} total={rows.length} />
      <WhatVerifiedMeans />
    </>
  );
}
