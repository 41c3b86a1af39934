import type { ReactNode } from 'react';
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

/** For `RecordSlots.action`: the panel of each claim that has a number. */
export const variationSlot = ({ revision, result, variations, asked }: SlotProps) =>
  function action(claimId: string): ReactNode {
    const claim = result?.claims.find((c) => c.id === claimId);
    const source = claim && variations ? variationSource(revision, claim, variations.readings[claimId]) : undefined;
    if (!source || !variations) return null;
    const filled = asked?.claimId === claimId ? asked : null;
    // A link on the page itself asks for another filling: the form begins anew with it.
    return <VariationPanel key={JSON.stringify(filled?.changes ?? null)} source={source} own={variations.variations.filter((v) => v.claimId === claimId)} left={variations.left} asked={filled} />;
  };
