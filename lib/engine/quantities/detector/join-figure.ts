import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import type { InspiralAmplitude } from '@/lib/engine/inspiral/post-newtonian-amplitude';
import { weightedSpectrum } from '@/lib/engine/routes/a/weighted-spectrum';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';

const DRAWN = 600;

const line = (label: string, role: FigureSeries['role'], values: readonly (number | null)[]): FigureSeries => ({ label, quantity: 'amplitude |h̃|', unit: '1/Hz', role, axis: 'left', scale: 'log', values });

/**
 * Both amplitudes over the band; solid where the hybrid takes them from the file.
 * Shape:  600 frequencies, evenly in the logarithm.
 * Units:  Hz and 1/Hz.
 * Error:  for the eye only.
 * Fails:  never.
 * Source: Q22.
 */
export function joinFigure({ a, band, response, declared, at }: DetectorPoint, amplitude: InspiralAmplitude, store: SpectrumStore): Figure[] {
  const { noise, fLowHz, fHighHz } = band;
  const f = Array.from({ length: DRAWN }, (_, i) => fLowHz * (fHighHz / fLowHz) ** (i / (DRAWN - 1)));
  const psd = (x: number): number => noise.psd(Math.min(Math.max(x, noise.fLowHz), noise.fHighHz));
  const numerical = weightedSpectrum(a, band, response, f, store).map((v, i) => (v === null ? null : Math.sqrt((v * psd(f[i]!)) / (4 * f[i]!))));
  const joinHz = declared.joinHz ?? Number.NaN;
  return [
    {
      kind: 'curve',
      title: 'Amplitudes on both sides of the join',
      at,
      x: { label: 'frequency', unit: 'Hz', scale: 'log', values: f },
      series: [
        line(`${a.waveform.name}, used from ${joinHz} Hz on`, 'recomputed', numerical.map((v, i) => (f[i]! >= joinHz ? v : null))),
        line(`${a.waveform.name}, left out`, 'noise', numerical.map((v, i) => (f[i]! < joinHz ? v : null))),
        line('post-Newtonian', 'claimed', f.map(amplitude)),
      ],
    },
  ];
}
