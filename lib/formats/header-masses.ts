import type { Finding } from '@/lib/engine/contract/finding';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { CommentLine } from './text/table';

interface Stated {
  readonly value: number;
  readonly line: number;
}

const number = String.raw`([+-]?\d+(?:\.\d*)?(?:[eEdD][+-]?\d+)?|[+-]?\.\d+(?:[eEdD][+-]?\d+)?)`;
const field = (names: string): RegExp => new RegExp(String.raw`(?:^|[\s,;({"'])(?:${names})["']?\s*[:=]\s*${number}(?![\w.])`, 'i');

const fields = {
  mass1: field('mass[-_ ]?1|m_?1|initial[-_ ]mass[-_ ]?1'),
  mass2: field('mass[-_ ]?2|m_?2|initial[-_ ]mass[-_ ]?2'),
  ratio: field('mass[-_ ]ratio|q'),
} as const;

function stated(comments: readonly CommentLine[], name: keyof typeof fields): Stated | null {
  for (const { line, text } of comments) {
    const found = fields[name].exec(text)?.[1];
    if (found !== undefined) return { value: Number(found.replace(/[dD]/, 'e')), line };
  }
  return null;
}

/** V22 asks when the masses differ from their total by more. */
const APART = 1e-3;
/** Printed mass ratios are rounded. */
const RATIO_APART = 5e-3;
/** Sums above this are not meant in units of the total mass. */
const IN_TOTAL_MASS = 2;

const short = (x: number): string => String(Number(x.toPrecision(5)));
const apart = (a: number, b: number): number => Math.abs(a - b) / Math.abs(b);

const ask = (file: string, line: number, text: string, fix: string): Finding => ({ code: 'claims/mass-sums', level: 'needs-answer', where: `${file}:${line}`, text, fix });

function sumFinding(file: string, m1: Stated, m2: Stated, { totalMassMsun, binary }: WaveformDeclaration): Finding[] {
  const sum = m1.value + m2.value;
  const total = sum > IN_TOTAL_MASS ? totalMassMsun : 1;
  if (total === null || !(sum > 0) || apart(sum, total) <= APART) return [];
  const { remnantMass, admEnergy } = binary;
  const is = [
    [remnantMass, 'the remnant mass'],
    [admEnergy, 'the ADM energy'],
  ] as const;
  const named = is.find(([mass]) => mass !== undefined && apart(sum, mass) < APART)?.[1];
  const guess = named ?? (sum < 0.975 && sum > 0.85 ? 'a remnant mass' : sum < 1 && sum > 0.975 ? 'an ADM energy' : null);
  const means = guess === null ? '' : ` That looks like ${guess}, not the initial total.`;
  const unit = total === 1 ? 'M' : 'M☉';
  return [ask(file, m2.line, `The component masses in the header of ${file} (lines ${m1.line} and ${m2.line}) add to ${short(sum)} ${unit} instead of ${short(total)} ${unit}.${means}`, 'Give masses in units of the initial total mass, or say which mass the times are in units of.')];
}

function ratioFinding(file: string, header: Stated, by: string, { binary }: WaveformDeclaration, ofBodies: boolean): Finding[] {
  const { massRatio, chi1z = 0, chi2z = 0 } = binary;
  if (massRatio === undefined || !(header.value > 0) || apart(header.value, massRatio) <= RATIO_APART) return [];
  const turned = apart(1 / header.value, massRatio) <= RATIO_APART;
  // Lighter over heavier is another way of writing the same; only the bodies' spins can then be exchanged.
  if (turned && (!ofBodies || chi1z === chi2z)) return [];
  const text = `The sheet gives massRatio ${short(massRatio)}; ${by} ${short(header.value)}${turned ? ', its inverse: the bodies are labelled the other way round' : ''}.`;
  return [ask(file, header.line, text, turned ? 'Check that chi1z belongs to the heavier body.' : 'Correct the one that is wrong.')];
}

/** V22 by what the header of a file says of the masses; silent where it says nothing that can be read. */
export function headerMassFindings(file: string, comments: readonly CommentLine[], declaration: WaveformDeclaration): Finding[] {
  const [m1, m2, ratio] = [stated(comments, 'mass1'), stated(comments, 'mass2'), stated(comments, 'ratio')];
  const pair = m1 !== null && m2 !== null ? { value: m1.value / m2.value, line: m2.line } : null;
  const sums = m1 !== null && m2 !== null ? sumFinding(file, m1, m2, declaration) : [];
  const said = pair !== null ? ratioFinding(file, pair, `the component masses in the header of ${file} (line ${pair.line}) give`, declaration, true) : [];
  if (said.length > 0 || ratio === null) return [...sums, ...said];
  return [...sums, ...ratioFinding(file, ratio, `line ${ratio.line} of ${file} gives`, declaration, false)];
}
