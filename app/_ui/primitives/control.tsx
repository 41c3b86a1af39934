import type { InputHTMLAttributes, ReactNode, Ref, SelectHTMLAttributes, TextareaHTMLAttributes } from 'react';
import { classes } from './classes';
import { Field } from './field';

const box = 'w-full min-w-0 rounded border border-control bg-sheet px-2.5 py-[7px] text-input text-ink aria-invalid:border-differs disabled:border-dashed disabled:text-ink-2';
const readOnly = 'read-only:bg-transparent';

type InputProps = InputHTMLAttributes<HTMLInputElement> & { readonly ref?: Ref<HTMLInputElement>; readonly dense?: boolean };
export const Input = ({ className, dense, ...rest }: InputProps) => <input {...rest} className={classes(box, readOnly, dense ? 'min-h-8 py-[5px]' : 'min-h-9', className)} />;

type TextareaProps = TextareaHTMLAttributes<HTMLTextAreaElement> & { readonly ref?: Ref<HTMLTextAreaElement> };
export const Textarea = ({ className, ...rest }: TextareaProps) => <textarea {...rest} className={classes(box, readOnly, 'min-h-[84px] resize-y leading-[22px]', className)} />;

type SelectProps = SelectHTMLAttributes<HTMLSelectElement> & { readonly ref?: Ref<HTMLSelectElement>; readonly dense?: boolean };
export const Select = ({ className, dense, ...rest }: SelectProps) => <select {...rest} className={classes(box, 'select-arrow truncate pr-[30px]', dense ? 'min-h-8 py-[5px]' : 'min-h-9', className)} />;

interface Labelled {
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  readonly error?: ReactNode;
  readonly labelHidden?: boolean;
  readonly fieldClassName?: string;
}

export function TextField({ label, hint, error, labelHidden, fieldClassName, id, ...rest }: Labelled & InputProps) {
  return (
    <Field label={label} hint={hint} error={error} labelHidden={labelHidden} className={fieldClassName} id={id}>
      {(aria) => <Input {...rest} {...aria} />}
    </Field>
  );
}

export function TextareaField({ label, hint, error, labelHidden, fieldClassName, id, ...rest }: Labelled & TextareaProps) {
  return (
    <Field label={label} hint={hint} error={error} labelHidden={labelHidden} className={fieldClassName} id={id}>
      {(aria) => <Textarea {...rest} {...aria} />}
    </Field>
  );
}

export function SelectField({ label, hint, error, labelHidden, fieldClassName, id, children, ...rest }: Labelled & SelectProps) {
  return (
    <Field label={label} hint={hint} error={error} labelHidden={labelHidden} className={fieldClassName} id={id}>
      {(aria) => <Select {...rest} {...aria}>{children}</Select>}
    </Field>
  );
}

export function Checkbox({ label, className, ...rest }: { readonly label: ReactNode } & InputProps) {
  return (
    <label className={classes('flex min-h-8 items-start gap-2.5 py-1.5 text-ui', className)}>
      <input {...rest} type="checkbox" className="mt-px size-[18px] flex-none accent-link" />
      <span>{label}</span>
    </label>
  );
}
