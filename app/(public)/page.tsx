import type { Metadata } from 'next';
import { LinkButton } from '../_ui/primitives/link-button';
import { loadActor, orNotFound } from '@/lib/http/page-guard';
import { readRegister } from '@/lib/services/records/read-register';
import { HowARecordComesToBe, WhatVerifiedMeans } from './how-it-comes';
import { LiveRecord, NewestRecords } from './newest-records';
import { WhatIsRecomputed } from './what-is-recomputed';

export const metadata: Metadata = {
  title: { absolute: 'Counterfoil: every number has two halves' },
  description: 'Numbers about gravitational waveforms, recomputed by two routes from the authors’ own files, questioned by referees, entered by an editor.',
  alternates: { types: { 'application/atom+xml': [{ url: '/register/feed.atom', title: 'Records as a feed' }] } },
};

export default async function Landing() {
  const actor = await loadActor();
  const newest = orNotFound(await readRegister(actor, {}, 5));
  // A struck or lapsed record stays in the register; it is no example of one that holds.
  const standing = orNotFound(await readRegister(actor, { standing: 'entered' }, 1));
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
        <LiveRecord actor={actor} row={standing.rows[0]} />
      </div>
      <HowARecordComesToBe />
      <WhatIsRecomputed />
      <NewestRecords rows={newest.rows} total={newest.everything} />
      <WhatVerifiedMeans />
    </>
  );
}
