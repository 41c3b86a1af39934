import type { FieldPath } from 'react-hook-form';
import type { ComposerFields } from './fields';
import type { ComposerForm } from './waveform-part';

/** What the form itself objects to at one field. */
export const errorAt = (form: ComposerForm, path: FieldPath<ComposerFields>): string | undefined => {
  const message: unknown = form.getFieldState(path, form.formState).error?.message;
  return typeof message === 'string' && message !== '' ? message : undefined;
};

/** Brings a field into sight and focus, also out of a closed disclosure. */
export function goToField(field: string): void {
  const control = document.getElementsByName(field)[0];
  if (!control) return;
  for (let around = control.closest('details'); around; around = around.parentElement?.closest('details') ?? null) around.open = true;
  control.focus();
  control.scrollIntoView({ block: 'center' });
}
