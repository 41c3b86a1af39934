'use client';
import type { ComposerForm } from './waveform-part';

/** The parts of the page, with how many of each there are. */
export function PartNav({ form, files }: { readonly form: ComposerForm; readonly files: number }) {
  const [waveforms, noise, claims] = form.watch(['waveforms', 'noise', 'claims']);
  const parts: readonly (readonly [id: string, label: string, count: number | null])[] = [
    ['files', 'Files', files],
    ['waveforms', 'Waveforms', waveforms.length],
    ['noise', 'Noise', noise.length],
    ['claims', 'Claims', claims.length],
    ['preview', 'First look', null],
    ['statement', 'Statement', null],
    ['people', 'People', null],
    ['check', 'Check', null],
  ];
  return (
    <nav aria-label="Parts of the draft" className="-mb-4">
      <ul className="flex flex-wrap gap-1 text-ui shadow-[inset_0_-1px_var(--hair-2)]">
        {parts.map(([id, label, count]) => (
          <li key={id}><a href={`#${id}`} className="inline-flex min-h-10 items-center gap-1.5 px-3 text-ink-2 no-underline hover:bg-hover hover:text-ink">{label}{count !== null && <span className="text-small">{count}</span>}</a></li>
        ))}
      </ul>
    </nav>
  );
}
