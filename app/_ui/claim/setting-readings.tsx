import Link from 'next/link';
import { Fragment } from 'react';
import { Disclosure } from '../primitives/disclosure';
import { conventionHref, type ConventionNote, type SettingReadings } from './convention-words';
import { settingLabel } from './setting-names';

/** The numbers of the conventions that a setting belongs to, each leading to its entry. */
export const ConventionLinks = ({ setting, notes }: SettingReadings) => (
  <>
    {notes.map(({ id, title }, i) => (
      <Fragment key={id}>
        {i > 0 && ' '}
        <Link href={conventionHref(id)} className="inline-flex min-h-8 min-w-8 items-center font-code text-code" title={`${title}: what else can be meant by it`}>
          {id}<span className="sr-only">: what else can be meant by {settingLabel(setting).toLowerCase()}</span>
        </Link>
      </Fragment>
    ))}
  </>
);

export const ConventionSentence = ({ note: { id, title, sentence, effect } }: { readonly note: ConventionNote }) => (
  <p className="[overflow-wrap:anywhere]">
    <Link href={conventionHref(id)} className="inline-flex min-h-8 items-center gap-1.5"><span className="font-code text-code">{id}</span> {title}</Link>
    <span className="block">{sentence}</span>
    <span className="block text-ink-2">{effect}</span>
  </p>
);

interface ReadingsProps {
  readonly readings: readonly SettingReadings[];
  /** What no setting can say. */
  readonly unsaid?: readonly Pick<ConventionNote, 'id' | 'title'>[];
  readonly summary: string;
  readonly className?: string;
}

/** What else can be meant by the settings of a claim, in full; closed until asked for. */
export function SettingReadingsList({ readings, unsaid = [], summary, className }: ReadingsProps) {
  if (readings.length === 0 && unsaid.length === 0) return null;
  return (
    <Disclosure summary={summary} className={className}>
      <dl className="grid gap-3 text-ui">
        {readings.map(({ setting, notes }) => (
          <div key={setting}>
            <dt className="font-semibold">{settingLabel(setting)}</dt>
            <dd className="grid gap-1">{notes.map((note) => <ConventionSentence key={note.id} note={note} />)}</dd>
          </div>
        ))}
        {unsaid.length > 0 && (
          <div>
            <dt className="font-semibold">Said by no setting</dt>
            <dd><ul>{unsaid.map(({ id, title }) => <li key={id}><Link href={conventionHref(id)} className="inline-flex min-h-8 items-center gap-1.5"><span className="font-code text-code">{id}</span> {title}</Link></li>)}</ul></dd>
          </div>
        )}
      </dl>
    </Disclosure>
  );
}
