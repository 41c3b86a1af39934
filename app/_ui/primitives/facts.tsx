import { Fragment, type ReactNode } from 'react';

export const Facts = ({ facts }: { readonly facts: readonly (readonly [term: ReactNode, value: ReactNode])[] }) => (
  <dl className="grid grid-cols-[max-content_minmax(0,1fr)] gap-x-4 gap-y-1 text-ui">
    {facts.map(([term, value], i) => (
      <Fragment key={i}>
        <dt className="text-ink-2">{term}</dt>
        <dd className="min-w-0 [overflow-wrap:anywhere]">{value}</dd>
      </Fragment>
    ))}
  </dl>
);

/** A digest, whole, in groups of four so that eyes can compare two; copying gives it without the gaps. */
export const Hash = ({ value, name = 'sha256' }: { readonly value: string; readonly name?: string }) => (
  <span className="font-code text-code text-ink-2 [overflow-wrap:anywhere]">
    {name}{' '}
    {(value.match(/.{1,4}/g) ?? []).map((group, i) => <span key={i} className="mr-[0.5ch]">{group}<wbr /></span>)}
  </span>
);
