'use client';
import { createContext, useContext, useEffect, useState, type ReactNode } from 'react';
import { Icon } from '../primitives/icon';

interface OpenState {
  readonly open: boolean;
  readonly toggle: () => void;
}
const Open = createContext<OpenState>({ open: true, toggle: () => undefined });

export const useClaimOpen = (): boolean => useContext(Open).open;

/** Holds whether one claim is open. An address that ends in the claim's id (`#C2`) opens it. */
export function ClaimOpenState({ claimId, initially, children }: { readonly claimId: string; readonly initially: boolean; readonly children: ReactNode }) {
  const [open, setOpen] = useState(initially);
  useEffect(() => {
    const follow = () => {
      if (window.location.hash === `#${claimId}`) setOpen(true);
    };
    follow();
    window.addEventListener('hashchange', follow);
    return () => window.removeEventListener('hashchange', follow);
  }, [claimId]);
  return <Open value={{ open, toggle: () => setOpen((now) => !now) }}>{children}</Open>;
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
