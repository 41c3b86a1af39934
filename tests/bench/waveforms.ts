/**
 * The benchmark's pair: two long chirps of one million samples at uneven steps, from a closed form,
 * so that no waveform file is needed. The start is switched on smoothly and the end rings down to
 * nothing: no taper enters, and the reference script needs none.
 */
const startM = -20000;
const endM = 450;
const switchOnM = 2000;
const widthM = 10;

export interface Chirp {
  readonly eta: number;
  readonly ringOmega: number;
}
export const pair: readonly [Chirp, Chirp] = [
  { eta: 0.25, ringOmega: 0.53 },
  { eta: 0.2496, ringOmega: 0.532 },
];

/** Times whose steps vary by a third along the record. */
export const unevenTimes = (n: number): Float64Array =>
  Float64Array.from({ length: n }, (_, i) => {
    const u = i / (n - 1);
    return startM + (endM - startM) * (u + 0.1 * Math.sin(Math.PI * u));
  });

const softPlus = (x: number): number => Math.max(x, 0) + Math.log1p(Math.exp(-Math.abs(x)));

function switchOn(t: number): number {
  const x = (t - startM) / switchOnM;
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  return 1 / (1 + Math.exp(Math.min(Math.max(1 / x - 1 / (1 - x), -700), 700)));
}

/** Post-Newtonian phase of time to merger, time itself saturating smoothly so that the end is finite. */
function sample(t: number, { eta, ringOmega }: Chirp): readonly [re: number, im: number] {
  const before = widthM * softPlus(-t / widthM);
  const after = widthM * softPlus(t / widthM);
  const theta = (eta / 5) * before + 0.35;
  const series =
    theta ** 0.625 +
    (3715 / 8064 + (55 * eta) / 96) * theta ** 0.375 -
    0.75 * Math.PI * theta ** 0.25 +
    (9275495 / 14450688 + (284875 / 258048) * eta + (1855 / 2048) * eta * eta) * theta ** 0.125;
  const phase = (-2 / eta) * series + ringOmega * after;
  const amplitude = 0.25 * theta ** -0.25 * Math.exp(-after / 11.7) * switchOn(t);
  return [amplitude * Math.cos(phase), -amplitude * Math.sin(phase)];
}

export function chirp(times: Float64Array, parameters: Chirp): { readonly re: Float64Array; readonly im: Float64Array } {
  const re = new Float64Array(times.length);
  const im = new Float64Array(times.length);
  for (let i = 0; i < times.length; i++) [re[i], im[i]] = sample(times[i]!, parameters) as [number, number];
  return { re, im };
}
