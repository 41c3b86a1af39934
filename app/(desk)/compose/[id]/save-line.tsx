import type { SaveState } from './save-draft';

const words: Record<SaveState['kind'], string> = { saved: 'Saved', changed: 'Changed, saving in a moment', saving: 'Saving', 'kept-here': 'Not saved, kept in this browser', conflict: 'Not saved: two versions', waiting: 'Changed; saved when the check has ended' };
const colours: Record<SaveState['kind'], string> = { saved: 'bg-agrees', changed: 'bg-waiting', saving: 'bg-waiting', waiting: 'bg-waiting', 'kept-here': 'bg-unsettled', conflict: 'bg-differs' };

/** Where what was typed is now. */
export const SaveLine = ({ state }: { readonly state: SaveState }) => (
  <p role="status" className="inline-flex items-center gap-2 text-ui text-ink-2">
    <span aria-hidden className={`size-2 ${colours[state.kind]}`} />
    {words[state.kind]}
  </p>
);
