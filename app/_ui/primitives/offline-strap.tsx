'use client';
import { useSyncExternalStore, type ReactNode } from 'react';
import { Button } from './button';

function subscribe(changed: () => void) {
  window.addEventListener('online', changed);
  window.addEventListener('offline', changed);
  return () => {
    window.removeEventListener('online', changed);
    window.removeEventListener('offline', changed);
  };
}

export const useOnline = (): boolean => useSyncExternalStore(subscribe, () => navigator.onLine, () => true);

/** Shown only while there is no connection; the children say what is kept meanwhile. */
export function OfflineStrap({ children }: { readonly children?: ReactNode }) {
  const online = useOnline();
  return (
    <div role="status">
      {!online && (
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2 rounded border border-unsettled bg-unsettled-tint px-4 py-2.5 text-ui text-ink">
          <b className="text-unsettled">No connection.</b>
          {children ?? 'What you have open stays readable; nothing is sent until the connection is back.'}
          <Button size="low" className="ml-auto" onClick={() => window.location.reload()}>Try now</Button>
        </div>
      )}
    </div>
  );
}
