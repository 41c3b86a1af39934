/** How a published record stands today. The document never changes; its standing is told beside it. */
export const RECORD_STANDINGS = ['entered', 'under-recheck', 'superseded', 'lapsed', 'struck'] as const;
export type RecordStanding = (typeof RECORD_STANDINGS)[number];

export const RECORD_STANDING_WORDS: Readonly<Record<RecordStanding, string>> = {
  entered: 'Entered',
  'under-recheck': 'Under recheck',
  superseded: 'Superseded',
  lapsed: 'Lapsed',
  struck: 'Struck',
};
