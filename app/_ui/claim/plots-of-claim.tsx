'use client';
import { LazyPlots } from '../charts/lazy-plots';
import type { FigurePlace } from '../charts/figure-place';
import { useClaimOpen } from './claim-open';

/** Asks for the curves when its claim is open. */
export function PlotsOfClaim({ claimId, href, place }: { readonly claimId: string; readonly href: string; readonly place: FigurePlace }) {
  return <LazyPlots claimId={claimId} href={href} place={place} wanted={useClaimOpen()} />;
}
