import type { Metadata } from 'next';
import { LinkButton } from '../_ui/primitives/link-button';
import { Perforation } from '../_ui/primitives/perforation';
import { HowARecordComesToBe, WhatVerifiedMeans } from './how-it-comes';

export const metadata: Metadata = { title: { absolute: 'Counterfoil: every number has two halves' } };

/** Stands where the newest record will, until there is one. */
const EmptyTicket = () => (
  <div aria-hidden className="meets grid h-48 grid-cols-[43%_24px_1fr] border border-dashed border-control">
    <span className="bg-claimed-side" />
    <Perforation lies="never" />
    <span className="bg-sheet" />
  </div>
);

export default function Landing() {
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
              <LinkButton href="/submissions" tone="main" size="tall">Lodge a claim</LinkButton>
              <LinkButton href="/register" size="tall">Read the register</LinkButton>
            </div>
          </div>
        </div>
        <EmptyTicket />
      </div>
      <HowARecordComesToBe />
      <WhatVerifiedMeans />
    </>
  );
}
