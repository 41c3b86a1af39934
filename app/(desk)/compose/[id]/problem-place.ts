import type { Problem } from '@/lib/kernel/problem';
import type { ComposerFields } from './fields';

export interface Place {
  /** The form's own path, for focus; null where the form has no field for it. */
  readonly field: string | null;
  readonly words: string;
}

const parts = (where: string): string[] => where.split('/').slice(1).map((p) => p.replaceAll('~1', '/').replaceAll('~0', '~'));

/** Words for what a sheet calls by another name than the form. */
const claimFields: Readonly<Record<string, string>> = { id: 'id', quantity: 'quantity', noise: 'noise', claimed: 'claimed', tolerance: 'tolerance', over: 'overSetting' };
const waveformFields = ['file', 'columns', 'domain', 'variable', 'timeUnit', 'amplitudeUnit', 'polarisation', 'negativeM', 'mode', 'totalMassMsun', 'distanceMpc', 'psi4Factor', 'junkEndM'];
const binaryFields = ['massRatio', 'chi1z', 'chi2z'];
const noiseFields = ['file', 'columns', 'sided', 'curve'];

/** From where a problem lies in the sheet to the field that mends it. */
export function placeOf(where: string, fields: Pick<ComposerFields, 'waveforms' | 'noise' | 'claims'>): Place {
  if (!where.startsWith('/')) return { field: null, words: where || 'The sheet' };
  const [part, key = '', ...rest] = parts(where);
  if (part === 'title' || part === 'statement') return { field: part, words: part === 'title' ? 'Title' : 'Statement' };
  if (part === 'claims') return placeInClaim(Number(key), rest, fields);
  if (part === 'waveforms' || part === 'noise') return placeInSource(part, key, rest, fields);
  return { field: null, words: where };
}

function placeInClaim(index: number, [name = '', inner = '']: readonly string[], { claims }: Pick<ComposerFields, 'claims'>): Place {
  const claim = claims[index];
  if (!claim) return { field: null, words: `Claim ${index + 1}` };
  const at = `claims.${index}`;
  const words = `Claim ${claim.id || index + 1}`;
  if (name === 'of') return { field: `${at}.${inner === 'b' ? 'b' : 'a'}`, words: `${words}, waveform ${inner}`.trim() };
  if (name === 'settings') return { field: inner ? `${at}.settings.${inner}` : `${at}.quantity`, words: inner ? `${words}, ${inner}` : words };
  if (name === 'over' && inner) return { field: `${at}.overValues`, words: `${words}, values of ${inner}` };
  const own = claimFields[name];
  return { field: own ? `${at}.${own}` : `${at}.id`, words: name ? `${words}, ${name}` : words };
}

function placeInSource(part: 'waveforms' | 'noise', key: string, [name = '', inner = '']: readonly string[], fields: Pick<ComposerFields, 'waveforms' | 'noise'>): Place {
  const index = fields[part].findIndex((row) => row.name.trim() === key);
  const words = `${part === 'noise' ? 'Noise curve' : 'Waveform'} ${key}`;
  if (index < 0) return { field: null, words };
  const at = `${part}.${index}`;
  if (part === 'waveforms' && name === 'binary' && binaryFields.includes(inner)) return { field: `${at}.${inner}`, words: `${words}, ${inner}` };
  const known = (part === 'noise' ? noiseFields : waveformFields).includes(name);
  return { field: known ? `${at}.${name}` : `${at}.name`, words: name ? `${words}, ${name}` : words };
}

/** Without the pointer, which means nothing to a person before a form. */
export const problemText = ({ saw, expected, hint }: Problem): string => `saw ${saw}; expected ${expected}.${hint ? ` ${hint}` : ''}`;
