import type { Finding } from '@/lib/engine/contract/finding';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { ModeTable } from './content';
import { headerMassFindings } from './header-masses';
import { identityFindings } from './hidden-identity';

/** What the comment lines of a waveform's files say: masses that do not add up (V22), and whose files they are (V29). */
export function headerFindings(declaration: WaveformDeclaration, tables: readonly ModeTable[]): Finding[] {
  const files = new Map(tables.map(({ table }) => [table.file, table.comments ?? []] as const));
  return [...files].flatMap(([file, comments]) => [...headerMassFindings(file, comments, declaration), ...identityFindings(file, comments)]);
}
