import type { ReactNode } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import { Icon } from '@/app/_ui/primitives/icon';
import { quantityWord } from '@/app/views/quantity-word';
import type { RegisterChoices, RegisterQuery } from '@/lib/services/records/register-query';
import { noiseWord, orderChoices, standingChoices, verdictChoices } from './filter-words';

interface FilterFormProps {
  readonly query: RegisterQuery;
  readonly choices: RegisterChoices;
  readonly filtersOn: number;
}

/** A plain form that asks by its address: it needs no script and can be bookmarked. */
export function FilterForm({ query: { ask, order }, choices, filtersOn }: FilterFormProps) {
  return (
    <form method="get" action="/register" role="search" aria-label="The register" className="mt-6">
      <div className="grid items-start gap-3 sm:grid-cols-[minmax(0,1fr)_auto]">
        <TextField label="Words in title, author, quantity or statement" name="text" type="search" maxLength={200} defaultValue={ask.text} key={`text ${ask.text ?? ''}`} hint={<>Every word counts. “A phrase” in quotation marks, <code>or</code> between two words, <code>-</code> before a word to leave it out.</>} />
        <Button type="submit" tone="main" icon={<Icon name="search" />} className="sm:mt-6">Search</Button>
      </div>
      <details className="register-filters mt-3" open={filtersOn > 0}>
        <summary className="inline-flex min-h-8 cursor-pointer items-center text-ui font-semibold text-link">{filtersOn === 0 ? 'Filters and order' : `Filters and order: ${filtersOn} on`}</summary>
        <div className="grid gap-3 pt-2 sm:grid-cols-2 stack:grid-cols-4">
          <Choose name="quantity" label="Quantity" value={ask.quantity} any="Any">{choices.quantities.map((id) => <option key={id} value={id}>{quantityWord(id)}</option>)}</Choose>
          <Choose name="verdict" label="With a claim that" value={ask.verdict} any="has any verdict"><Options of={verdictChoices} /></Choose>
          <Choose name="noise" label="Noise curve" value={ask.noise} any="Any or none">{choices.noises.map((id) => <option key={id} value={id}>{noiseWord(id)}</option>)}</Choose>
          <Choose name="standing" label="Standing today" value={ask.standing} any="Any"><Options of={standingChoices} /></Choose>
          <TextField label="Entered from (UTC day)" name="from" type="date" defaultValue={ask.from} key={`from ${ask.from ?? ''}`} />
          <TextField label="Entered until" name="to" type="date" defaultValue={ask.to} key={`to ${ask.to ?? ''}`} />
          <Choose name="sort" label="Order" value={order}><Options of={orderChoices.filter((choice) => choice.value !== 'relevance' || ask.text !== undefined)} /></Choose>
          <Button type="submit" className="self-end justify-self-start">Apply</Button>
        </div>
      </details>
    </form>
  );
}

const Options = ({ of }: { readonly of: readonly { readonly value: string; readonly label: string }[] }) => of.map((choice) => <option key={choice.value} value={choice.value}>{choice.label}</option>);

/** A value that the register holds no longer is still offered, so that the form says what was asked. */
function Choose({ name, label, value, any, children }: { readonly name: string; readonly label: string; readonly value: string | undefined; readonly any?: string; readonly children: ReactNode }) {
  return (
    <SelectField label={label} name={name} defaultValue={value ?? ''} key={`${name} ${value ?? ''}`}>
      {any !== undefined && <option value="">{any}</option>}
      {children}
    </SelectField>
  );
}
