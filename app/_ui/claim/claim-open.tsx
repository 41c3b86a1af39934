'use client';
import { parseAsArrayOf, parseAsString, useQueryState } from 'nuqs';
import { createContext, useCallback, useContext, useEffect, useMemo, useRef, type ReactNode } from 'react';
import { Icon } from '../primitives/icon';

interface OpenState {
  readonly open: boolean;
  readonly toggle: () => void;
}
const Open = createContext<OpenState>({ open: true, toggle: () => undefined });

export const useClaimOpen = (): boolean => useContext(Open).open;

/** `open=C1,C3`; `open=` when all are closed that stand open at first. */
const claimIds = parseAsArrayOf(parseAsString);

const sameClaims = (a: readonly string[], b: readonly string[]): boolean => a.length === b.length && a.every((id) => b.includes(id));

interface ClaimOpenStateProps {
  readonly claimId: string;
  /** Claims that stand open where the address says nothing. */
  readonly initially: readonly string[];
  readonly children: ReactNode;
}

/** Whether a claim is open stands in the address, so that a page is sent as it is seen; one that ends in the claim's id (`#C2`) opens it. */
export function ClaimOpenState({ claimId, initially, children }: ClaimOpenStateProps) {
  const [asked, setAsked] = useQueryState('open', claimIds);
  const open = (asked ?? initially).includes(claimId);
  const set = useCallback(
    (wanted: boolean) =>
      void setAsked((now) => {
        const others = (now ?? initially).filter((id) => id !== claimId);
        const next = wanted ? [...others, claimId] : others;
        return sameClaims(next, initially) ? null : next;
      }),
    [claimId, initially, setAsked],
  );
  const latest = useRef(set);
  useEffect(() => {
    latest.current = set;
  });
  // Only on arrival: a claim that was closed by hand stays closed when the page is drawn anew.
  useEffect(() => {
    const follow = () => {
      if (window.location.hash === `#${claimId}`) latest.current(true);
    };
    follow();
    window.addEventListener('hashchange', follow);
    return () => window.removeEventListener('hashchange', follow);
  }, [claimId]);
  const state = useMemo(() => ({ open, toggle: () => set(!open) }), [open, set]);
  return <Open value={state}>{children}</Open>;
}

export function ClaimOpener({ controls, children }: { readonly controls: string; readonly children: ReactNode }) {
  const { open, toggle } = useContext(Open);
  return (
    <button type="button" className="opener" aria-expanded={open} aria-controls={controls} onClick={toggle}>
      <Icon name="open" />
      <span>{children}</span>
    </button>
  );
}

export function OpenedRow({ id, across, children }: { readonly id: string; readonly across?: boolean; readonly children: ReactNode }) {
  const { open } = useContext(Open);
  return <tr id={id} role="row" className={across ? 'opened across' : 'opened'} hidden={!open}>{children}</tr>;
}
