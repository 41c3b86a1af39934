'use client';
import { useState } from 'react';
import { Button } from '../_ui/primitives/button';
import { Input } from '../_ui/primitives/control';
import { Field } from '../_ui/primitives/field';

interface PasswordFieldProps {
  readonly name: string;
  readonly label?: string;
  readonly hint?: string;
  readonly isNew?: boolean;
}

export function PasswordField({ name, label = 'Password', hint, isNew }: PasswordFieldProps) {
  const [shown, setShown] = useState(false);
  return (
    <Field label={label} hint={hint}>
      {(aria) => (
        <span className="flex gap-1">
          <Input {...aria} name={name} type={shown ? 'text' : 'password'} autoComplete={isNew ? 'new-password' : 'current-password'} required minLength={isNew ? 15 : undefined} maxLength={256} />
          <Button onClick={() => setShown((now) => !now)} aria-pressed={shown}>{shown ? 'Hide' : 'Show'}</Button>
        </span>
      )}
    </Field>
  );
}
