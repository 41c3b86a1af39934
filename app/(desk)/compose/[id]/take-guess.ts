import type { FieldPath } from 'react-hook-form';
import type { SheetChange } from '@/lib/pipeline/guesses/sheet-guess';
import type { ComposerFields } from './fields';
import { placeOf } from './problem-place';
import type { ComposerForm } from './waveform-part';

type Path = FieldPath<ComposerFields>;

/** The form's own path and value for one change; files by mode are no field of the form and travel in `rest`. */
function asField({ field, value }: SheetChange, form: ComposerForm): { readonly path: Path; readonly value: unknown } | null {
  const filed = /^\/waveforms\/.*\/files$/.test(field);
  const { field: path } = placeOf(filed ? field.replace(/\/files$/, '') : field, form.getValues());
  if (path === null) return null;
  if (!filed) return { path: path as Path, value: value === null ? '' : Array.isArray(value) ? value.join(' ') : String(value) };
  const rest = path.replace(/\.name$/, '.rest') as Path;
  return { path: rest, value: { ...(form.getValues(rest) as object), files: value } };
}

/** Writes what the data say into the form, as if it were typed; gives back what undoes it. */
export function takeGuess(changes: readonly SheetChange[], form: ComposerForm): () => void {
  const put = (path: Path, value: unknown): void => form.setValue(path, value as never, { shouldDirty: true, shouldTouch: true, shouldValidate: true });
  const fields = changes.flatMap((change) => asField(change, form) ?? []);
  const before = fields.map(({ path }) => ({ path, value: structuredClone(form.getValues(path)) as unknown }));
  for (const { path, value } of fields) put(path, value);
  return () => { for (const { path, value } of before) put(path, value); };
}
