import { describe, expect, it } from 'vitest';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { quantities } from '@/lib/engine/quantities/registry';
import { sweepFigure } from '@/lib/engine/quantities/sweep-figure';
import { binary, columns, curve, inMasses, measured, type Claim } from '../../../support/detector-claims';

const a = binary('A');
const settings = { totalMassMsun: 150, distanceMpc: 500, fLowHz: 20 } as const;
const snr = (more: Partial<Claim> = {}, changed: object = {}) =>
  measured({ quantity: 'snr', a, ...more, settings: { ...settings, ...changed } });
const codes = (m: ReturnType<typeof snr>) => m.findings.map(({ code, level }) => `${code} ${level}`);

function stopped(m: ReturnType<typeof snr>, code: string): void {
  expect(codes(m)).toContain(`${code} stops-lodging`);
  expect(m.points.map((p) => p.value)).toEqual(m.points.map(() => null));
  expect(m.findings[0]!.text).toMatch(/\w/);
}

describe('what stops a claim', () => {
  it('a band that begins or ends outside the curve (V18), with both frequencies in the sentence', () => {
    const low = snr({}, { fLowHz: 5 });
    stopped(low, 'engine/band-beyond-curve');
    expect(low.findings[0]!.text).toContain('starts at 10 Hz');
    expect(low.findings[0]!.text).toContain('from 5 Hz');
    stopped(snr({}, { fHighHz: 9000 }), 'engine/band-beyond-curve');
    expect(codes(snr({}, { fHighHz: 8192 * (1 + 1e-10) }))).not.toContain('engine/band-beyond-curve stops-lodging');
  });

  it('an average on a curve that holds it already', () => {
    const massive = { totalMassMsun: 1e6, fLowHz: 1e-4, fHighHz: 0.02 };
    stopped(snr({ noise: curve('SB') }, { ...massive, average: 'sky' }), 'engine/curve-already-averaged');
    const plain = snr({ noise: curve('SB') }, massive);
    expect(plain.points[0]!.value).toBeGreaterThan(0);
    expect(plain.assumed).not.toContain('average');
  });

  it('an average over orientation of a strain along one line of sight', () => {
    const axis = Float64Array.from({ length: 2000 }, (_, i) => i / 4096);
    const burst = axis.map((t) => 1e-21 * Math.exp(-(((t - 0.25) / 0.03) ** 2)) * Math.cos(2 * Math.PI * 120 * t));
    const one = columns('P', axis, burst, null);
    stopped(measured({ quantity: 'snr', a: one, settings: { fLowHz: 20, average: 'volume' } }), 'engine/average-needs-modes');
    stopped(measured({ quantity: 'snr', a: one, settings: { fLowHz: 20, response: 'cross' } }), 'engine/no-signal');
    expect(measured({ quantity: 'snr', a: one, settings: { fLowHz: 20 } }).points[0]!.value).toBeGreaterThan(0);
  });

  it('a line of sight or a response without signal', () => {
    stopped(snr({ a: { ...a, negativeM: 'none' } }, { inclinationRad: Math.PI }), 'engine/no-signal');
    stopped(snr({}, { modes: [[3, 3]] }), 'engine/no-signal');
    stopped(
      snr(
        {},
        {
          modes: [
            [2, 2],
            [2, -2],
          ],
          inclinationRad: Math.PI / 2,
          response: 'cross',
        },
      ),
      'engine/no-signal',
    );
  });

  it('a band above everything the samples carry', () => {
    stopped(snr({}, { totalMassMsun: 1e5, fLowHz: 20 }), 'engine/no-signal');
  });

  it('a noise curve that is not positive, from wherever it comes', () => {
    const noise = { ...curve('G2'), psd: (f: number) => (f > 100 ? 0 : 1e-46), points: Float64Array.of(10, 50, 200, 4000) };
    stopped(snr({ noise }), 'engine/curve-invalid');
  });

  it('a record of a few samples, and an overlap of records that share no time', () => {
    const axis = Float64Array.from({ length: 4000 }, (_, i) => i / 4096);
    const burst = axis.map((t) => 1e-21 * Math.exp(-(((t - 0.5) / 0.03) ** 2)) * Math.cos(2 * Math.PI * 120 * t));
    const near = columns('P', axis, burst, null);
    const far = columns(
      'Q',
      axis.map((t) => t + 3e6),
      burst,
      null,
    );
    stopped(
      measured({ quantity: 'snr', a: columns('R', axis.subarray(0, 9), burst.subarray(2000, 2009), null), settings: { fLowHz: 20 } }),
      'engine/too-few-points',
    );
    stopped(measured({ quantity: 'overlap', a: near, b: far, settings: { fLowHz: 20 } }), 'engine/records-far-apart');
    const match = measured({ quantity: 'match', a: near, b: far, settings: { fLowHz: 20 } }).points[0]!;
    expect(match.value!).toAgreeWith(1, 1e-9);
    expect(match.components!['timeShiftS']!).toAgreeWith(-3e6, 1e-6);
  });

  it('maximising over the polarisation of one response, or over the inclination of columns', () => {
    stopped(
      measured({ quantity: 'match', a, b: a, settings: { totalMassMsun: 150, maximise: ['time', 'polarisation'] } }),
      'engine/polarisation-needs-complex',
    );
  });
});

describe('what is said beside a number', () => {
  it('modes below m = 0 that were made up need an answer (V14)', () => {
    const { content, ...rest } = a;
    const half = inMasses('H', rest.axis, content.kind === 'modes' ? content.modes.filter((m) => m.m > 0) : [], {
      uniformStep: rest.uniformStep,
      negativeM: null,
    });
    const m = snr({ a: half });
    expect(codes(m)).toContain('engine/negative-m-assumed needs-answer');
    expect(m.assumed).toContain('negativeM');
    expect(m.points[0]!.value!).toAgreeWith(snr().points[0]!.value!, { relative: 1e-12 });
  });

  it('a signal that starts in the band is a lower bound for loudness and needs an answer for a match (V07)', () => {
    const light = { totalMassMsun: 20 };
    const loud = snr({}, light);
    expect(codes(loud)).toContain('engine/signal-starts-in-band worth-a-look');
    expect(loud.points[0]!.remarks).toEqual(['lower bound only']);
    const text = loud.findings.find((f) => f.code === 'engine/signal-starts-in-band')!.text;
    const least = Number(/smallest mass whose signal fills the band is (\S+) M☉/.exec(text)![1]);
    expect(codes(snr({}, { totalMassMsun: least * 1.02 }))).not.toContain('engine/signal-starts-in-band worth-a-look');
    expect(snr({}, { totalMassMsun: least * 1.02 }).points[0]!.remarks).toBeUndefined();
    const match = measured({
      quantity: 'match',
      a,
      b: binary('B', { chi1z: 0.1, chi2z: 0.1 }),
      settings: { totalMassMsun: 20, fLowHz: 20 },
    });
    expect(codes(match)).toContain('engine/signal-starts-in-band needs-answer');
    expect(match.points[0]!.value).toBeGreaterThan(0);
  });

  it('a ramp that reaches into the band (V08), and an edge above what the samples carry', () => {
    const first = snr({}, { totalMassMsun: 20 }).findings.find((f) => f.code === 'engine/signal-starts-in-band')!;
    const least = Number(/is (\S+) M☉/.exec(first.text)![1]);
    expect(codes(snr({}, { totalMassMsun: least * 0.995 }))).toContain('engine/taper-room worth-a-look');
    expect(codes(snr({}, { totalMassMsun: 250, fHighHz: 8000 }))).toContain('engine/band-beyond-sampling worth-a-look');
    expect(codes(snr({}, { totalMassMsun: 250 }))).not.toContain('engine/band-beyond-sampling worth-a-look');
  });

  it('listed modes that the file does not have', () => {
    expect(
      codes(
        snr(
          {},
          {
            modes: [
              [2, 2],
              [5, 5],
            ],
          },
        ),
      ),
    ).toContain('engine/modes-missing worth-a-look');
  });
});

describe('what is assumed', () => {
  it('is what could change the value, and nothing else', () => {
    expect(snr().assumed).toEqual([
      'massFrame',
      'fHighHz',
      'inclinationRad',
      'azimuthRad',
      'response',
      'modes',
      'average',
      'detectors',
      'armAngleDeg',
      'taper',
    ]);
    const axis = Float64Array.from({ length: 4000 }, (_, i) => i / 4096);
    const burst = axis.map((t) => 1e-21 * Math.exp(-(((t - 0.5) / 0.03) ** 2)) * Math.cos(2 * Math.PI * 120 * t));
    const quiet = columns(
      'P',
      axis,
      burst,
      burst.map((x) => -x),
    );
    const match = measured({ quantity: 'match', a: quiet, b: quiet, settings: { fLowHz: 20 } });
    expect(match.assumed).toEqual(['fHighHz', 'maximise', 'response']);
    const declared = measured({
      quantity: 'match',
      a: quiet,
      b: quiet,
      settings: { fLowHz: 20, fHighHz: 900, maximise: ['time'], response: 'plus' },
    });
    expect(declared.assumed).toEqual([]);
  });

  it('names each setting with its value, unit and standing', () => {
    const { settings: used } = snr();
    expect(used.find(({ name }) => name === 'fLowHz')).toEqual({ name: 'fLowHz', value: 20, standing: 'declared', unit: 'Hz' });
    expect(used.find(({ name }) => name === 'response')).toEqual({ name: 'response', value: 'plus', standing: 'assumed' });
    const swept = measured({
      quantity: 'snr',
      a,
      settings: { distanceMpc: 500, fLowHz: 20 },
      over: { setting: 'totalMassMsun', values: [100, 200] },
    });
    expect(swept.settings.find(({ name }) => name === 'totalMassMsun')).toEqual({
      name: 'totalMassMsun',
      value: { from: 100, to: 200 },
      standing: 'swept',
      unit: 'M☉',
    });
  });

  it('includes the lower edge when the curve gives it', () => {
    const { fLowHz: _, ...rest } = settings;
    const m = measured({ quantity: 'snr', a, settings: rest });
    expect(m.assumed).toContain('fLowHz');
    expect(m.settings.find(({ name }) => name === 'fLowHz')!.value).toBe(10);
  });
});

describe('the error budget', () => {
  it('keeps what is computed in U and leaves what is not known empty', () => {
    const { budget, points } = snr();
    const line = (id: string) => budget.find((l) => l.id === id)!;
    expect(budget.filter((l) => l.group === 'computation').map((l) => l.id)).toEqual(['E01', 'E02', 'rounding', 'E17']);
    const u = Math.hypot(...budget.filter((l) => l.group === 'computation').map((l) => l.u!));
    expect(points[0]!.expandedUncertainty!).toAgreeWith(2 * u, { relative: 1e-12 });
    for (const id of ['E05', 'E06']) expect(line(id)).toMatchObject({ u: null, group: 'coverage' });
    expect(line('E03').u).toBeGreaterThan(0);
    expect(line('E04').u).toBe(0);
  });

  it('sees the printed digits and a coarse noise table', () => {
    const f = Array.from({ length: 25 }, (_, i) => 10 * 200 ** (i / 24));
    const coarse = tabulatedCurve({ name: 'coarse', f, values: f.map((x) => curve('G2').psd(x)), meaning: 'psd', sided: 'one' });
    const noise = coarse.ok ? coarse.value.curve : null;
    const short = snr({ a: { ...a, significantDigits: 4 }, noise: noise! });
    const line = (id: string) => short.budget.find((l) => l.id === id)!.u!;
    expect(line('rounding')).toBeGreaterThan(1e-8);
    expect(line('E04') / short.points[0]!.value!).toBeGreaterThan(1e-4);
  });

  it('covers the distance between the routes', () => {
    for (const m of [snr(), snr({}, { inclinationRad: 1 })]) {
      const { routes, expandedUncertainty } = m.points[0]!;
      expect(Math.abs(routes.A! - routes.B!)).toBeLessThan(2 * expandedUncertainty! + 1e-9 * routes.A!);
    }
  });
});

describe('a sweep', () => {
  const values = Array.from({ length: 14 }, (_, i) => 100 + 10 * i);
  const claimed = values.map((_, i) => (i === 9 ? 1 : null));
  const m = measured({
    quantity: 'snr',
    a,
    settings: { distanceMpc: 500, fLowHz: 20 },
    over: { setting: 'totalMassMsun', values },
    claimed,
    withFigures: true,
  });

  it('runs route B at both ends, at the worst point and eight between', () => {
    expect(m.routeBPoints).toContain(0);
    expect(m.routeBPoints).toContain(13);
    expect(m.routeBPoints).toContain(9);
    expect(m.routeBPoints.length).toBeLessThanOrEqual(11);
    m.points.forEach((p, i) => expect(p.routes.B === null).toBe(!m.routeBPoints.includes(i)));
  });

  it('equals single claims at the same masses', () => {
    expect(m.points[3]!.value!).toAgreeWith(snr({}, { totalMassMsun: 130 }).points[0]!.value!, { relative: 1e-10 });
    expect(m.points.every((p) => p.expandedUncertainty! > 0)).toBe(true);
  });

  it('brings the integrand and the strain, and is drawn with its band and its claimed points', () => {
    expect(m.figures.map((f) => f.kind)).toEqual(['waveforms', 'integrand']);
    const request = { claimId: 'C', inputs: { of: { a }, noise: curve('G2') }, settings: {}, over: { setting: 'totalMassMsun', values }, claimed, withFigures: true } as const;
    const figures = [...m.figures, ...sweepFigure(quantities.get('snr')!, request, m.points)];
    for (const { x, series } of figures) for (const s of series) expect(s.values.length).toBe(x.values.length);
    expect(Math.max(...figures.map((f) => f.x.values.length))).toBeLessThanOrEqual(1500);
    expect(figures[2]!.series.map((s) => s.role)).toEqual(['recomputed', 'band-low', 'band-high', 'claimed']);
  });

  it('gives the same bytes every time', () => {
    const again = measured({
      quantity: 'snr',
      a,
      settings: { distanceMpc: 500, fLowHz: 20 },
      over: { setting: 'totalMassMsun', values },
      claimed,
      withFigures: true,
    });
    expect(JSON.stringify(again)).toBe(JSON.stringify(m));
  });

  it('stops when it is told to', () => {
    const request = { claimId: 'C', inputs: { of: { a }, noise: curve('G2') }, settings, over: null, claimed: [], withFigures: false };
    expect(() => quantities.get('snr')!.measure(request, { onProgress: () => undefined, cancelled: () => true })).toThrow('cancelled');
  });
});
