import type { ReactNode } from 'react';
import { Perforation } from '../_ui/primitives/perforation';

/** The account pages' frame: the form on the left half, what it is about on the right. */
export const TwoSided = ({ title, form, children }: { readonly title: string; readonly form: ReactNode; readonly children: ReactNode }) => (
  <div className="wrap pt-8 stack:pt-14">
    <div className="halves halves-even mx-auto max-w-[980px] [&>:not(.perf)]:p-6 sm:[&>:not(.perf)]:px-9 sm:[&>:not(.perf)]:py-8">
      <div><h1 className="mb-5">{title}</h1>{form}</div>
      <Perforation />
      <div className="grid content-start gap-3 text-ui text-ink-2">{children}</div>
    </div>
  </div>
);
