import { gaussRule } from '../routes/b/gauss-legendre';
import { binaryOf, type BinaryParameters } from '../synthesis/binary';
import { orbitalDecay } from '../synthesis/inspiral';
import type { RadiationRecord } from './radiation-record';
import { startFrequency } from './start-frequency';

/** Binding energy radiated since infinite separation, as a fraction of M, at x = (MΩ)^{2/3} (Q12). */
export function bindingEnergy(eta: number, x: number): number {
  return ((eta * x) / 2) * (1 - ((9 + eta) / 12) * x - ((81 - 57 * eta + eta * eta) / 24) * x * x);
}

/** Route A: x a time earlier, by fourth-order Runge–Kutta in small steps. */
function earlierBySteps(decay: (x: number) => number, x0: number, timeM: number): number {
  const steps = Math.max(200, Math.ceil(timeM / 2));
  const h = -timeM / steps;
  let x = x0;
  for (let i = 0; i < steps; i++) {
    const k1 = decay(x);
    const k2 = decay(x + (h / 2) * k1);
    const k3 = decay(x + (h / 2) * k2);
    const k4 = decay(x + h * k3);
    x += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
  }
  return x;
}

/** ∫dx/ẋ from low to high in y = x⁻⁴, in which the integrand is nearly constant. */
function timeBetween(decay: (x: number) => number, low: number, high: number): number {
  const rule = gaussRule(32);
  const [y0, y1] = [high ** -4, low ** -4];
  let sum = 0;
  for (let i = 0; i < rule.x.length; i++) {
    const x = ((y0 + y1) / 2 + ((y1 - y0) / 2) * rule.x[i]!) ** -0.25;
    sum += (rule.w[i]! * x ** 5) / (4 * decay(x));
  }
  return (sum * (y1 - y0)) / 2;
}

/** Route B: the x from which the time to x0 is the one wanted, by bisection on a quadrature. */
function earlierByQuadrature(decay: (x: number) => number, x0: number, timeM: number): number {
  let low = x0 / 2;
  while (timeBetween(decay, low, x0) < timeM) low /= 2;
  let high = x0;
  for (let pass = 0; pass < 80; pass++) {
    const middle = (low + high) / 2;
    if (timeBetween(decay, middle, x0) > timeM) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

export type BeforeRule = false | true | 'removed';

/**
 * Energy added for what lies before startM: since infinite separation (`true`), or between the first
 * sample and startM (`removed`), x integrated back with the rate of appendix B.
 * Shape:  one number.
 * Units:  startM in M; fraction of M.
 * Error:  post-Newtonian truncation (a definition here); the routes' quadratures agree to 1e-10.
 * Fails:  null when the record gives no starting frequency.
 * Source: settings.md section 5; domain reference Q12 and appendix B.
 */
export function energyBefore(record: RadiationRecord, startM: number, rule: BeforeRule, binary: BinaryParameters, route: 'A' | 'B'): number | null {
  if (rule === false) return 0;
  const first = record.axis[0]!;
  const start = Math.max(startM, first);
  const omega = startFrequency(record, start, route);
  if (omega === null) return null;
  const known = binaryOf(binary);
  const x0 = (omega / 2) ** (2 / 3);
  if (rule === true) return bindingEnergy(known.eta, x0);
  if (start === first) return 0;
  const decay = orbitalDecay(known);
  const earlier = route === 'A' ? earlierBySteps(decay, x0, start - first) : earlierByQuadrature(decay, x0, start - first);
  return bindingEnergy(known.eta, x0) - bindingEnergy(known.eta, earlier);
}
