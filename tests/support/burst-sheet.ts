import type { DraftSheet } from '@/lib/services/submissions/submission-view';

/**
 * Two Gaussian bursts in white noise: small, and their match is known in closed form. For equal
 * phases at the peak, widths s₁, s₂: match = √(2 s₁ s₂ / (s₁² + s₂²)).
 */
const WIDTHS_S = { a: 0.01, b: 0.012 } as const;
export const BURST_MATCH = Math.sqrt((2 * WIDTHS_S.a * WIDTHS_S.b) / (WIDTHS_S.a ** 2 + WIDTHS_S.b ** 2));

function burst(widthS: number): string {
  const stepS = 1 / 4096;
  const lines = ['# t [s]  h+'];
  for (let i = 0; i < 4096; i++) {
    const t = (i - 2048) * stepS;
    lines.push(`${t.toFixed(9)} ${(1e-21 * Math.exp(-(t ** 2) / (2 * widthS ** 2)) * Math.cos(2 * Math.PI * 150 * t)).toExponential(12)}`);
  }
  return `${lines.join('\n')}\n`;
}

export const burstFiles = (): Readonly<Record<string, string>> => ({
  'a.txt': burst(WIDTHS_S.a),
  'b.txt': burst(WIDTHS_S.b),
  'psd.txt': '# f [Hz]  S [1/Hz]\n1 4e-46\n2000 4e-46\n',
});

const waveform = (file: string) => ({ file, domain: 'time', variable: 'strain', columns: ['t', 'plus'], timeUnit: 's', amplitudeUnit: 'strain' });

export const burstSheet = (claimed: string = BURST_MATCH.toFixed(4)): DraftSheet => ({
  format: 'counterfoil-claim/1',
  title: 'Two bursts in white noise',
  statement: 'The match of two bursts is $\\sqrt{2 s_1 s_2/(s_1^2+s_2^2)}$.',
  waveforms: { A: waveform('a.txt'), B: waveform('b.txt') },
  noise: { W: { file: 'psd.txt', columns: ['f', 'psd'], sided: 'one' } },
  claims: [{ id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'W', settings: { fLowHz: 10, fHighHz: 1900, taper: 'none' }, claimed, tolerance: 0.0005 }],
});
