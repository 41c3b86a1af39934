import { peakTime, withResolutionError } from '@/lib/engine/synthesis/effects';
import { binaryOf, cut, findingsOf, inM, type FindingSpecimen } from './finding-specimen';

const clean = binaryOf();
const peak = peakTime(clean);
const errors = [{ resolution: 1 / 80, phaseRad: 0.3 }, { resolution: 1 / 96, phaseRad: 0.3 * (80 / 96) ** 4 }, { resolution: 1 / 112, phaseRad: 0.3 * (80 / 112) ** 4 }];
const runs = errors.map(({ resolution, phaseRad }, i) => inM(withResolutionError(clean, { phaseRad, amplitude: 0 }, peak), { name: `R${i + 1}`, series: 'R', resolution }));
const late = inM(cut(withResolutionError(clean, { phaseRad: 0.3, amplitude: 0 }, peak), 20, 5000), { name: 'R1', series: 'R', resolution: 1 / 80 });

/** H(u, r) = H(u)(1 − 1.5 M/r) at each radius. */
const radii = (list: readonly number[]) =>
  list.map((r, i) => {
    const gain = 1 - 1.5 / r;
    const modes = clean.modes.map((mode) => ({ ...mode, re: mode.re.map((x) => gain * x), im: mode.im.map((x) => gain * x) }));
    return inM({ t: clean.t, modes }, { name: `r${i + 1}`, series: 'r', extractionRadiusM: r });
  });

export const runSpecimens: readonly FindingSpecimen[] = [
  {
    number: 'V26', code: 'engine/few-resolutions', level: 'worth-a-look', when: 'a limit rests on two resolutions',
    raises: () => findingsOf('extrapolated-value', { of: { series: runs.slice(1) }, settings: { observable: 'phase-at-peak', formalOrder: 4 } }), says: [/2|Two/, 'no order can be measured'],
    silent: () => findingsOf('extrapolated-value', { of: { series: runs }, settings: { observable: 'phase-at-peak' } }),
  },
  {
    number: 'V26', code: 'engine/few-resolutions', level: 'worth-a-look', when: 'the runs begin at different times',
    raises: () => findingsOf('convergence-order', { of: { series: [late, ...runs.slice(1)] } }), says: ['R1 at t = 20 M', 'R2 at t = 0 M'],
    silent: () => findingsOf('convergence-order', { of: { series: runs } }),
  },
  {
    number: 'V27', code: 'engine/few-radii', level: 'worth-a-look', when: 'four radii span less than a factor of two',
    raises: () => findingsOf('radius-extrapolation', { of: { series: radii([100, 120, 140, 160]) } }), says: ['at least four radii', 'here are 4 spanning a factor 1.6'],
    silent: () => findingsOf('radius-extrapolation', { of: { series: radii([60, 80, 100, 150, 200]) } }),
  },
];
