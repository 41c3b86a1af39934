'use client';
import { useEffect, useState } from 'react';
import type { Figure } from '@/lib/engine/contract/measurement';
import type { FiguresByClaim } from '@/lib/pipeline/result';
import { Button } from '../primitives/button';
import { Skeleton } from '../primitives/page-state';
import { ClaimPlots } from './claim-plots';
import type { FigurePlace } from './figure-place';
import { figuresAt } from './figure-place';

/** One request a run, however many claims and places ask; a failed one may be asked again. */
const asked = new Map<string, Promise<FiguresByClaim>>();

async function request(href: string): Promise<FiguresByClaim> {
  const response = await fetch(href, { headers: { accept: 'application/json' } });
  if (!response.ok) throw new Error(`figures answered ${response.status}`);
  return ((await response.json()) as { readonly figures: FiguresByClaim }).figures;
}

function figuresOf(href: string): Promise<FiguresByClaim> {
  const known = asked.get(href);
  if (known) return known;
  const fresh = request(href);
  asked.set(href, fresh);
  fresh.catch(() => asked.delete(href));
  return fresh;
}

interface LazyPlotsProps {
  readonly claimId: string;
  readonly href: string;
  readonly place: FigurePlace;
  /** False while the claim is closed: a closed claim asks for nothing. */
  readonly wanted: boolean;
}

type State = { readonly kind: 'waiting' } | { readonly kind: 'here'; readonly figures: readonly Figure[] } | { readonly kind: 'missing' };

/** Curves are heavy and only for eyes, so they come when a claim is opened and not with the page. */
export function LazyPlots({ claimId, href, place, wanted }: LazyPlotsProps) {
  const [state, setState] = useState<State>({ kind: 'waiting' });
  const [tries, setTries] = useState(0);
  useEffect(() => {
    if (!wanted) return;
    let gone = false;
    figuresOf(href).then(
      (all) => { if (!gone) setState({ kind: 'here', figures: figuresAt(place, all[claimId] ?? []) }); },
      () => { if (!gone) setState({ kind: 'missing' }); },
    );
    return () => {
      gone = true;
    };
  }, [claimId, href, place, wanted, tries]);
  if (state.kind === 'here') return <ClaimPlots claimId={claimId} figures={state.figures} />;
  if (place === 'below') return null;
  if (state.kind === 'missing') return <p role="status" className="text-ui text-ink-2">The curves could not be fetched. The numbers stand without them. <Button size="low" onClick={() => setTries((n) => n + 1)}>Try again</Button></p>;
  return <div aria-busy="true" className="grid h-56 content-end border-b border-hair-2"><span role="status" className="sr-only">Loading the plots of {claimId}</span><Skeleton width="100%" /></div>;
}
