import type { ConventionNote, SettingReadings } from '@/app/_ui/claim/convention-words';
import { besideSetting, unsaid } from '@/lib/explain/conventions/beside-setting';
import { conventions } from '@/lib/explain/conventions/conventions';

/** One object for each convention, so that what is sent to a browser says it once. */
const notes: ReadonlyMap<string, ConventionNote> = new Map(conventions.map(({ id, title, sentence, effect }) => [id, { id, title, sentence, effect }]));

const noteOf = ({ id }: { readonly id: string }): ConventionNote[] => {
  const note = notes.get(id);
  return note ? [note] : [];
};

/** What else can be meant by a setting of such a claim. */
export const notesBeside = (quantity: string, setting: string): readonly ConventionNote[] => besideSetting(quantity, setting).flatMap(noteOf);

/** The same for several; settings that nobody reads otherwise are passed over. */
export const readingsOf = (quantity: string, settings: readonly string[]): readonly SettingReadings[] =>
  settings.map((setting) => ({ setting, notes: notesBeside(quantity, setting) })).filter((one) => one.notes.length > 0);

/** What no setting can say, by its title alone. */
export const unsaidOf = (quantity: string): readonly Pick<ConventionNote, 'id' | 'title'>[] => unsaid(quantity).map(({ id, title }) => ({ id, title }));
