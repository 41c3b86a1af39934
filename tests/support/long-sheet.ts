import type { DraftSheet } from '@/lib/services/submissions/submission-view';

/** A damped sinusoid of many samples: its radiated energy is known in closed form, and computing it takes seconds. */
export function longFile(nRows: number): string {
  const lines = ['# t/M  Re(rh22/M)  Im(rh22/M)'];
  const step = 400 / nRows;
  for (let i = 0; i < nRows; i++) {
    const t = i * step;
    const size = 0.3 * Math.exp(-t / 12) * (1 - Math.exp(-((t / 4) ** 4)));
    lines.push(`${t.toFixed(9)} ${(size * Math.cos(0.55 * t)).toExponential(12)} ${(-size * Math.sin(0.55 * t)).toExponential(12)}`);
  }
  return `${lines.join('\n')}\n`;
}

export const longSheet = (): DraftSheet => ({
  format: 'counterfoil-claim/1',
  title: 'A long damped sinusoid',
  statement: '',
  waveforms: { A: { file: 'a.txt', domain: 'time', variable: 'strain', columns: ['t', 're22', 'im22'], timeUnit: 'M', amplitudeUnit: 'rh/M', negativeM: 'mirror' } },
  noise: {},
  claims: [1, 2].map((n) => ({ id: `C${n}`, quantity: 'radiated-energy', of: { a: 'A' }, claimed: '0.006', tolerance: 0.002 })),
});
