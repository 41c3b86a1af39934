import type { Route } from 'next';
import Link from 'next/link';
import { Fragment } from 'react';
import { commonWords, kindWords } from '@/app/_ui/claim/convention-words';
import { settingLabel } from '@/app/_ui/claim/setting-names';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Table } from '@/app/_ui/primitives/table';
import { quantityWord } from '@/app/views/quantity-word';
import type { Convention, ConventionGroup } from '@/lib/explain/conventions/convention';
import { conventions, groupTitles } from '@/lib/explain/conventions/conventions';
import { notTried } from '@/lib/explain/conventions/not-tried';

/** Where the house says what it means, section by section. */
const houseSections: Readonly<Record<ConventionGroup, readonly (readonly [anchor: string, words: string])[]>> = {
  noise: [['noise', 'noise'], ['fourier-transform', 'Fourier transform']],
  band: [['taper', 'taper'], ['noise', 'band and curve']],
  maximisation: [['maximisation', 'maximisation']],
  angle: [['modes', 'modes and angles'], ['polarisation', 'polarisation']],
  mass: [['mass', 'mass'], ['frame-and-redshift', 'frame and redshift'], ['expansion', 'expansion']],
  variable: [['polarisation', 'polarisation and variable'], ['time', 'time']],
  modes: [['modes', 'modes'], ['modes-with-negative-m', 'modes with negative m']],
  integration: [['tolerance-and-uncertainty', 'what is chosen and what is known']],
  units: [['units-and-constants', 'units and constants'], ['electromagnetic-fields', 'electromagnetic fields']],
};

export function GroupTable({ group }: { readonly group: ConventionGroup }) {
  const title = groupTitles[group];
  return (
    <section aria-labelledby={group} className="mt-10">
      <h2 id={group} className="scroll-mt-6">{title}</h2>
      <p className="mt-1 text-ui text-ink-2">
        What the house means: {houseSections[group].map(([anchor, words], i) => <Fragment key={anchor}>{i > 0 && ', '}<Link href={`/methods/house-conventions#${anchor}`} className="inline-flex min-h-8 items-center">{words}</Link></Fragment>)}
      </p>
      <Table caption={`Conventions: ${title.toLowerCase()}`} className="mt-2 min-w-[68rem] table-fixed">
        <thead>
          <tr><th scope="col" className="w-[20%]">Convention</th><th scope="col" className="w-[18%]">Can mean</th><th scope="col" className="w-[25%]">What it does to a number</th><th scope="col" className="w-[12%]">Met, and kind</th><th scope="col" className="w-[12%]">Affects</th><th scope="col">Shown by</th></tr>
        </thead>
        <tbody>{conventions.filter((convention) => convention.group === group).map((convention) => <Row key={convention.id} convention={convention} />)}</tbody>
      </Table>
    </section>
  );
}

/** The row of the address stands out, so that the eye finds what it came for. */
function Row({ convention }: { readonly convention: Convention }) {
  const { id, title, sentence, options, effect, commonness, kinds, affects, detect } = convention;
  return (
    <tr id={id} className="scroll-mt-6 target:bg-hover">
      <th scope="row"><span className="font-code text-code text-ink-2">{id}</span> {title}<span className="mt-1 block font-normal">{sentence}</span></th>
      <td><ul className="grid gap-1">{options.map((option) => <li key={option.id}>{option.label}</li>)}</ul></td>
      <td>{effect}</td>
      <td>{commonWords[commonness]}<span className="block text-ink-2">{kinds.map((kind) => kindWords[kind]).join(' or ')}</span></td>
      <td><Affected id={id} affects={affects} /></td>
      <td>{detect ?? 'No file shows it; only the text can.'}<SaidBy convention={convention} />{notTried[id] !== undefined && <span className="mt-1 block text-ink-2">Not tried by the search, because {notTried[id]}.</span>}</td>
    </tr>
  );
}

const few = 3;

/** A noise curve stands behind half of all quantities: long lists open on demand. */
function Affected({ id, affects }: Pick<Convention, 'id' | 'affects'>) {
  const list = <ul>{affects.map((quantity) => <li key={quantity}><Link href={`/methods/${quantity}` as Route} className="inline-flex min-h-8 items-center">{quantityWord(quantity)}</Link></li>)}</ul>;
  return affects.length <= few ? list : <Disclosure summary={<span className="relative">{affects.length} quantities<span className="sr-only"> that {id} affects</span></span>}>{list}</Disclosure>;
}

const SaidBy = ({ convention: { settings } }: { readonly convention: Convention }) =>
  settings.length === 0 ? (
    <span className="mt-1 block text-ink-2">No setting of a sheet says it.</span>
  ) : (
    <span className="mt-1 block text-ink-2">Said by {settings.map((name, i) => <Fragment key={name}>{i > 0 && ', '}{settingLabel(name).toLowerCase()} <code className="font-code text-code">{name}</code></Fragment>)}</span>
  );
