'use client';
import dynamic from 'next/dynamic';
import { useDeferredValue } from 'react';
import { TextareaField, TextField } from '@/app/_ui/primitives/control';
import type { ComposerForm } from './waveform-part';

/** The same setting and sanitising as on every page; it comes to the browser only for whoever writes. */
const Prose = dynamic(() => import('@/app/_ui/math/render-markdown').then((m) => m.Prose), { ssr: false, loading: () => <p className="text-ui text-ink-2">Setting the text</p> });

export function TitleField({ form }: { readonly form: ComposerForm }) {
  return <TextField label="Title" placeholder="What is claimed, in a line" maxLength={300} error={form.formState.errors.title?.message} {...form.register('title')} />;
}

export function StatementPart({ form }: { readonly form: ComposerForm }) {
  const statement = useDeferredValue(form.watch('statement'));
  return (
    <div className="grid gap-4">
      <TextareaField label="Statement" rows={10} hint="Markdown, with maths between dollar signs: $\mathcal M = 0.9984(3)$." {...form.register('statement')} />
      <section aria-label="How the statement reads" className="rounded border border-dashed border-control bg-sheet px-5 py-4">
        {statement.trim() === '' ? <p className="text-ui text-ink-2">What you write is set here as readers will see it.</p> : <Prose source={statement} />}
      </section>
    </div>
  );
}
