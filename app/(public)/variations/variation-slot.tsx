import type { ReactNode } from 'react';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { readingsOfClaim } from '@/lib/pipeline/explain/offered-readings';
import type { ResultDocument } from '@/lib/pipeline/result';
import type { VariationList } from '@/lib/services/variations/variation-view';
import type { AskedVariation } from './asked-variation';
import { VariationPanel } from './variation-panel';
import { variationSource } from './variation-source';

interface SlotProps {
  readonly revision: Parameters<typeof variationSource>[0];
  readonly result: ResultDocument | null;
  /** Null where the reader may not vary. */
  readonly variations: VariationList | null;
  readonly asked: AskedVariation | null;
}

/** Why no convention can be read otherwise here, and who can change that. */
export function withoutReadings(engine: string, isDraft: boolean): string {
  const why = `These numbers were computed by ${engine === ENGINE_VERSION ? 'an earlier build of ' : ''}engine ${engine}, before guesses about files and other readings of conventions were kept, so none is offered here; settings, curve and stretch can be varied.`;
  if (isDraft) return `${why} Check the draft again to have them.`;
  return engine === ENGINE_VERSION ? `${why} A later engine brings them when an administrator has it measured again; a next revision has them at once.` : `${why} They come when an administrator has it measured again by the present engine, ${ENGINE_VERSION}.`;
}

/** For `RecordSlots.action`: the panel of each claim that has a number. */
export const variationSlot = ({ revision, result, variations, asked }: SlotProps) =>
  function action(claimId: string): ReactNode {
    const claim = result?.claims.find((c) => c.id === claimId);
    const source = claim && variations ? variationSource(revision, claim, readingsOfClaim(variations.readings ?? {}, claimId), variations.readings === null ? withoutReadings(result?.engine ?? '', revision.isDraft ?? false) : null) : undefined;
    if (!source || !variations) return null;
    const filled = asked?.claimId === claimId ? asked : null;
    // A link on the page itself asks for another filling: the form begins anew with it.
    return <VariationPanel key={JSON.stringify(filled?.changes ?? null)} source={source} own={variations.variations.filter((v) => v.claimId === claimId)} left={variations.left} asked={filled} />;
  };
