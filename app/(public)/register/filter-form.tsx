import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextField } from '@/app/_ui/primitives/control';
import { Icon } from '@/app/_ui/primitives/icon';
import { quantityWord } from '@/app/views/quantity-word';
import { verdictChoices } from './filter-words';
import type { Filter } from './register-filter';

/** A plain form that asks by its address: it needs no script and can be bookmarked. */
export function FilterForm({ filter, quantities }: { readonly filter: Filter; readonly quantities: readonly string[] }) {
  return (
    <form method="get" action="/register" role="search" className="mt-6 grid items-end gap-3 sm:grid-cols-2 mid:grid-cols-[minmax(0,1fr)_220px_220px_auto]">
      <TextField label="Words in title, author or quantity" name="text" type="search" defaultValue={filter.text} key={`text ${filter.text ?? ''}`} />
      <SelectField label="Quantity" name="quantity" defaultValue={filter.quantity ?? ''} key={`quantity ${filter.quantity ?? ''}`}>
        <option value="">Any</option>
        {quantities.map((id) => <option key={id} value={id}>{quantityWord(id)}</option>)}
      </SelectField>
      <SelectField label="With a claim that" name="verdict" defaultValue={filter.verdict ?? ''} key={`verdict ${filter.verdict ?? ''}`}>
        <option value="">has any verdict</option>
        {verdictChoices.map((choice) => <option key={choice.value} value={choice.value}>{choice.label}</option>)}
      </SelectField>
      <Button type="submit" tone="main" icon={<Icon name="search" />}>Search</Button>
    </form>
  );
}
