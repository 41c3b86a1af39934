import { database } from '@/db/client';
import { listRegisterClaims } from '@/db/reads/records/register';
import { RECORD_STANDING_WORDS } from '@/lib/badges/standing';
import { quantities } from '@/lib/engine/quantities/registry';
import { changeOf, type RegisterExport } from './export-register';
import { registerParams, usualOrder } from './register-query';

export const FEED_SHAPE = { name: 'feed.atom', edition: 1, order: 'changed', limit: 50 } as const;
type Entry = RegisterExport['entries'][number];
interface Claim {
  readonly recordId: string;
  readonly claimId: string;
  readonly quantity: string;
  readonly verdict: string;
}

/** Characters that XML 1.0 cannot hold, however they are written, and halves of a pair that lost the other. */
const unwritable = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g;
const entities: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
export const xmlText = (text: string): string => text.replace(unwritable, '\ufffd').replace(/[&<>"']/g, (sign) => entities[sign] ?? sign);

const element = (name: string, text: string, attributes = ''): string => `<${name}${attributes}>${xmlText(text)}</${name}>`;
const link = (rel: string, type: string, href: string): string => `<link rel="${rel}" type="${type}" href="${xmlText(href)}"/>`;

/** Atom (RFC 4287): records newly entered, and those whose standing changed, the newest change first. */
export async function feedOf(data: RegisterExport): Promise<string> {
  const claims = data.entries.length === 0 ? [] : await listRegisterClaims(database(), data.entries.map((entry) => entry.id));
  return writeFeed(data, claims);
}

export function writeFeed({ entries, ask, origin }: Pick<RegisterExport, 'entries' | 'ask' | 'origin'>, claims: readonly Claim[]): string {
  const params = registerParams({ ask, order: usualOrder(ask.text), page: 1 });
  const at = (path: string): string => `${origin}${path}${params.size > 0 ? `?${params}` : ''}`;
  return [
    '<?xml version="1.0" encoding="utf-8"?>',
    '<feed xmlns="http://www.w3.org/2005/Atom" xml:lang="en">',
    element('id', at('/register/feed.atom')),
    element('title', 'Counterfoil: register'),
    element('subtitle', params.size > 0 ? 'Records of recomputed claims that fit a search.' : 'Records of recomputed claims, each with its verdicts.'),
    // A feed without entries has to bear a date as well; the beginning of time never moves.
    element('updated', (entries[0] ? changeOf(entries[0]) : new Date(0)).toISOString()),
    '<author><name>Counterfoil</name></author>',
    link('self', 'application/atom+xml', at('/register/feed.atom')),
    link('alternate', 'text/html', at('/register')),
    ...entries.map((entry) => writeEntry(entry, claims.filter((claim) => claim.recordId === entry.id), origin)),
    '</feed>',
    '',
  ].join('\n');
}

function writeEntry(entry: Entry, claims: readonly Claim[], origin: string): string {
  const page = `${origin}/records/${entry.id}`;
  const kinds = [...new Set(claims.map((claim) => claim.quantity))];
  return [
    '<entry>',
    element('id', page),
    element('title', entry.title),
    element('published', entry.enteredAt.toISOString()),
    element('updated', changeOf(entry).toISOString()),
    ...entry.authors.map((name) => `<author>${element('name', name)}</author>`),
    link('alternate', 'text/html', page),
    link('related', 'application/json', `${page}/record.json`),
    ...kinds.map((kind) => `<category term="${xmlText(kind)}" scheme="${xmlText(`${origin}/methods`)}" label="${xmlText(titleOf(kind))}"/>`),
    element('summary', summaryOf(entry, claims), ' type="text"'),
    '</entry>',
  ].join('\n');
}

const titleOf = (quantity: string): string => quantities.get(quantity)?.title ?? quantity;

function summaryOf(entry: Entry, claims: readonly Claim[]): string {
  const stands = entry.standing === 'entered' ? `Entered at level ${entry.level}.` : `${RECORD_STANDING_WORDS[entry.standing]}${entry.reason ? `: ${entry.reason}` : '.'}`;
  return `${stands} ${claims.map((claim) => `${claim.claimId}, ${titleOf(claim.quantity).toLowerCase()}: ${claim.verdict.replaceAll('-', ' ')}`).join('; ')}.`;
}
