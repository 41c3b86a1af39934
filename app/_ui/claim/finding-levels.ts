import type { FindingLevel } from '@/lib/engine/contract/finding';

/** How each level is called and edged, wherever a finding is shown. */
export const findingLevels: Record<FindingLevel, { readonly word: string; readonly edge: string }> = {
  'stops-lodging': { word: 'Stops lodging', edge: 'edge-stop' },
  'needs-answer': { word: 'Needs an answer', edge: 'edge-ask' },
  'worth-a-look': { word: 'Worth a look', edge: 'edge-look' },
  note: { word: 'Note', edge: 'edge-note' },
};

/** Anchor of a code on the page of findings. */
export const findingAnchor = (code: string): string => code.replace('/', '-');
