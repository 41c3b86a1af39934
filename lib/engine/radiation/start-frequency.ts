import type { RadiationRecord } from './radiation-record';

/** Phase φ = −arg H₂₂ (increasing for house rotation) over two cycles from startM, with times from startM. */
interface PhaseTrack {
  readonly t: number[];
  readonly phase: number[];
}

const TWO_CYCLES = 4 * Math.PI;

function phaseTrack(record: RadiationRecord, startM: number): PhaseTrack | null {
  const mode = record.modes.find(({ l, m }) => l === 2 && m === 2);
  if (mode === undefined) return null;
  const { axis } = record;
  const { re, im } = mode;
  const first = axis.findIndex((x) => x >= startM);
  if (first < 0) return null;
  const track: PhaseTrack = { t: [axis[first]! - startM], phase: [0] };
  for (let i = first + 1, phase = 0; i < axis.length && Math.abs(phase) <= TWO_CYCLES; i++) {
    phase -= Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!);
    track.t.push(axis[i]! - startM);
    track.phase.push(phase);
  }
  return track.t.length >= 3 ? track : null;
}

/** Slope at t = 0 of the least-squares parabola, by polynomials orthogonal on the samples. */
function slopeByOrthogonalPolynomials({ t, phase }: PhaseTrack): number {
  const n = t.length;
  const mean = t.reduce((a, b) => a + b, 0) / n;
  const u = t.map((x) => x - mean);
  const second = u.reduce((a, x) => a + x * x, 0) / n;
  const third = u.reduce((a, x) => a + x ** 3, 0) / n;
  const q = u.map((x) => x * x - (third / second) * x - second);
  const along = (p: readonly number[]): number => p.reduce((a, x, i) => a + x * phase[i]!, 0) / p.reduce((a, x) => a + x * x, 0);
  return along(u) + along(q) * (-2 * mean - third / second);
}

/** The same slope by the three normal equations in scaled time. */
function slopeByNormalEquations({ t, phase }: PhaseTrack): number {
  const scale = t[t.length - 1]!;
  const s = [0, 0, 0, 0, 0];
  const r = [0, 0, 0];
  t.forEach((x, i) => {
    for (let k = 0, power = 1; k < 5; k++, power *= x / scale) {
      s[k] = s[k]! + power;
      if (k < 3) r[k] = r[k]! + power * phase[i]!;
    }
  });
  const det = (a: number, b: number, c: number, d: number, e: number, f: number, g: number, h: number, i: number): number =>
    a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g);
  const [s0, s1, s2, s3, s4] = s as [number, number, number, number, number];
  const [r0, r1, r2] = r as [number, number, number];
  return det(s0, r0, s2, s1, r1, s3, s2, r2, s4) / det(s0, s1, s2, s1, s2, s3, s2, s3, s4) / scale;
}

/**
 * Mω₂₂ at startM: slope there of a parabola fitted to the (2,2) phase over its first two cycles.
 * Shape:  one number, positive for either sense of rotation.
 * Units:  startM in M; rad/M.
 * Error:  of the fit, which is the definition; routes A and B differ in rounding only.
 * Fails:  null without a (2,2) mode or with fewer than three samples after startM.
 * Source: settings.md section 5 (`balance-pn`).
 */
export function startFrequency(record: RadiationRecord, startM: number, route: 'A' | 'B'): number | null {
  const track = phaseTrack(record, Math.max(startM, record.axis[0]!));
  if (track === null) return null;
  const slope = Math.abs(route === 'A' ? slopeByNormalEquations(track) : slopeByOrthogonalPolynomials(track));
  return slope > 0 && Number.isFinite(slope) ? slope : null;
}
