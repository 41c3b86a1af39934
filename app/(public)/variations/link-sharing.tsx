'use client';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { Button } from '@/app/_ui/primitives/button';
import type { VariationPage } from '@/lib/services/variations/variation-view';
import { openByLink } from './actions';
import { SEEN_BY } from './variation-words';

/** Who sees it, and for its owner on a record the one choice there is. */
export function LinkSharing({ variation }: { readonly variation: Pick<VariationPage, 'id' | 'submissionId' | 'visibility' | 'mayShare'> }) {
  const { busy, trouble, run } = useAct(openByLink);
  const isOpen = variation.visibility === 'link';
  return (
    <div className="grid gap-2">
      <p className="text-ui" role="status">Seen by {SEEN_BY[variation.visibility]}.</p>
      {variation.mayShare && (
        <>
          <p className="text-small text-ink-2">{isOpen ? 'Shut, its address answers only you again; what others copied meanwhile stays with them.' : 'Opened, whoever has its address reads number, settings and note. It shows no name, and official numbers stay as they are.'}</p>
          <div><Button size="low" busy={busy ? (isOpen ? 'Shutting' : 'Opening') : null} onClick={() => void run({ id: variation.submissionId, variationId: variation.id, readable: !isOpen })}>{isOpen ? 'Shut it again' : 'Let whoever has the link read it'}</Button></div>
        </>
      )}
      <Trouble trouble={trouble} />
    </div>
  );
}
