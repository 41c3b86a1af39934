import { emptyClaim, type ClaimFields } from './claim-fields';

/** A row of a pasted table: claims with the columns that were recognised, and what could not be read. */
export interface Pasted {
  readonly claims: readonly ClaimFields[];
  readonly columns: readonly string[];
  readonly problems: readonly string[];
}

const direct = ['id', 'quantity', 'a', 'b', 'em', 'gw', 'series', 'noise', 'claimed', 'tolerance'] as const;
type Direct = (typeof direct)[number];
const isDirect = (name: string): name is Direct => (direct as readonly string[]).includes(name);

const aliases: Readonly<Record<string, string>> = { value: 'claimed', 'claimed value': 'claimed', claim: 'id', mass: 'totalMassMsun', 'total mass': 'totalMassMsun', m: 'totalMassMsun', distance: 'distanceMpc', flow: 'fLowHz', fhigh: 'fHighHz' };

/** Cells of a line: tabs as a spreadsheet copies them, else commas or semicolons. */
const cells = (line: string): string[] => line.split(line.includes('\t') ? '\t' : line.includes(';') ? ';' : ',').map((c) => c.trim());

function columnName(head: string, settings: readonly string[]): string | null {
  const plain = head.trim();
  const lower = plain.toLowerCase();
  if (isDirect(lower)) return lower;
  const name = aliases[lower] ?? plain;
  if (isDirect(name)) return name;
  return settings.find((s) => s.toLowerCase() === name.toLowerCase()) ?? null;
}

/**
 * A table copied from a spreadsheet, its first line naming the columns (`id`, `quantity`, `a`, `b`, `em`, `gw`,
 * `series`, `noise`, `claimed`, `tolerance`, or any setting). What a row leaves out is taken from `like`.
 */
export function pasteClaims(text: string, taken: readonly string[], settings: readonly string[], like?: ClaimFields): Pasted {
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== '');
  const [head, ...rows] = lines;
  if (head === undefined || rows.length === 0) return { claims: [], columns: [], problems: ['A table needs a first line with the names of its columns and at least one row below it.'] };
  const names = cells(head).map((h) => columnName(h, settings));
  const problems = cells(head).flatMap((h, i) => (names[i] === null ? [`Column ${i + 1}, “${h}”, is no column of a claim and is left out.`] : []));
  if (!names.includes('claimed')) problems.push('No column is named “claimed”, so no value will be filled in.');
  const ids = [...taken];
  const claims = rows.map((row, line) => {
    const claim = fill(emptyClaim(ids, like), names, cells(row));
    if (ids.includes(claim.id)) {
      problems.push(`Row ${line + 1}: the id ${claim.id} is taken; another is used.`);
      claim.id = emptyClaim(ids).id;
    }
    ids.push(claim.id);
    return claim;
  });
  return { claims, columns: names.filter((n) => n !== null), problems };
}

function fill(claim: ClaimFields, names: readonly (string | null)[], row: readonly string[]): ClaimFields {
  names.forEach((name, i) => {
    const cell = row[i] ?? '';
    if (name === null || cell === '') return;
    if (isDirect(name)) claim[name] = cell;
    else claim.settings[name] = cell;
  });
  return claim;
}
