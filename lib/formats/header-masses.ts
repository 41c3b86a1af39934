import type { Finding } from '@/lib/engine/contract/finding';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import { apart, massSum, RATIO_APART, stated, type Stated } from './stated-masses';
import type { CommentLine } from './text/table';

const short = (x: number): string => String(Number(x.toPrecision(5)));

const ask = (file: string, line: number, text: string, fix: string): Finding => ({ code: 'claims/mass-sums', level: 'needs-answer', where: `${file}:${line}`, text, fix });

function sumFinding(file: string, m1: Stated, m2: Stated, { totalMassMsun, binary }: WaveformDeclaration): Finding[] {
  const off = massSum(m1.value, m2.value, totalMassMsun, binary);
  if (off === null) return [];
  const { sum, total, unit, looksLike } = off;
  const means = looksLike === null ? '' : ` That looks like ${looksLike}, not the initial total.`;
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
