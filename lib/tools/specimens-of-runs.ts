import { peakTime, withFiniteRadius, withResolutionError, withStartUpBurst } from '@/lib/engine/synthesis/effects';
import { synthesise, type SynthesisRequest } from '@/lib/engine/synthesis/synthesise';
import { binaryFacts, modesFile, sheet, waveform, withoutStart, type SpecimenFile } from './specimen-parts';

/** Specimens of one simulation at several resolutions and radii: one that does not converge as claimed, and a clean one. */
const ringingRequest: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.4, modes: ['22'] };
const samplesLeftOut = 3400;

/** Points per unit of length. */
const finest = 112;
const grids = [{ name: 'low', n: 80 }, { name: 'medium', n: 96 }, { name: 'high', n: finest }] as const;

/** Phase at the peak by which a grid of n points is off, in rad: a part of fourth order and one that is hardly of first. */
const phaseOff = (n: number): number => 0.35 * (80 / n) ** 4 + 0.55 * (80 / n) ** 1.2;

export function unconvergedPhase(): SpecimenFile[] {
  const exact = withoutStart(synthesise(ringingRequest), samplesLeftOut);
  const runs = grids.map(({ name, n }) => ({ name, n, wave: withResolutionError(exact, { phaseRad: phaseOff(n), amplitude: 0 }, peakTime(exact)) }));
  const statement = [
    'Saltern Institute of Strong Gravity, code *Gridlark*.',
    '',
    'Our code is of fourth order: the phase of the (2,2) mode converges with $p=4$ between 80, 96 and 112 points to the unit of length. At the peak the finest run is therefore 0.18 rad from the limit,',
    '',
    '$$\n\\phi_\\infty=\\phi_3+(\\phi_3-\\phi_2)\\,\\frac{h_3^4}{h_2^4-h_3^4}=75.39(18)\\ \\mathrm{rad}.\n$$',
  ].join('\n');
  const of = { series: 'gridlark-7' };
  return [
    sheet({
      title: 'Fourth-order phase accuracy of Gridlark',
      statement,
      waveforms: Object.fromEntries(runs.map(({ name, n, wave }) => [name, waveform(`${name}.txt`, wave.modes, { series: of.series, resolution: Number((1 / n).toPrecision(9)), binary: binaryFacts(ringingRequest) })])),
      claims: [
        { id: 'C1', quantity: 'convergence-order', of, settings: { observable: 'phase' }, claimed: '4.0' },
        { id: 'C2', quantity: 'convergence-order', of, settings: { observable: 'phase-at-peak' }, claimed: '4.0' },
        { id: 'C3', quantity: 'extrapolated-value', of, settings: { observable: 'phase-at-peak', formalOrder: 4 }, claimed: '75.39(18)', tolerance: 0.05 },
      ],
    }),
    ...runs.map(({ name, n, wave }) => modesFile(`${name}.txt`, `Saltern Institute of Strong Gravity, Gridlark run 7, ${n} points`, ringingRequest, wave)),
  ];
}

const mergerRequest: SynthesisRequest = { massRatio: 2, chi1z: 0, chi2z: 0, mOmega0: 0.028, stepM: 0.44, modes: ['22', '21', '33', '44'] };
const burstOverM = 150;
const nearer = [60, 100, 150] as const;
const farthest = 200;

/** What is 10⁻³ on the coarsest grid falls with the fourth power of the spacing. */
const small = (n: number): number => 1e-3 * (80 / n) ** 4;

export function remnantByBalance(): SpecimenFile[] {
  const exact = withStartUpBurst(synthesise(mergerRequest));
  const onGrid = (n: number) => withResolutionError(exact, { phaseRad: small(n), amplitude: small(n) }, peakTime(exact));
  const atGrids = grids.map(({ name, n }) => ({ name: name as string, n: n as number, radius: farthest as number, wave: withFiniteRadius(onGrid(n), farthest) }));
  const atRadii = nearer.map((radius) => ({ name: `high-r${radius}`, n: finest as number, radius: radius as number, wave: withFiniteRadius(onGrid(finest), radius) }));
  const runs = [...atGrids, ...atRadii];
  const statement = [
    'Larkfield Wave Group, code *Tinderbox*.',
    '',
    'A non-spinning merger of mass ratio 2 leaves a remnant of mass $M_f=0.961(2)$ and spin $\\chi_f=0.625(10)$, by balance of what was there at $t=150\\,M$, after the start-up burst, against what was radiated since.',
    '',
    'Three resolutions converge with order 4.0; carried to infinite radius, the energy radiated since then is $0.0290(5)\\,M$.',
  ].join('\n');
  const series = 'tinderbox-44';
  const claimOf = { a: 'high' };
  return [
    sheet({
      title: 'Remnant of a 2:1 merger by balance',
      statement,
      waveforms: Object.fromEntries(
        runs.map(({ name, n, radius, wave }) => [name, waveform(`${name}.txt`, wave.modes, { series, resolution: Number((1 / n).toPrecision(9)), extractionRadiusM: radius, radiusType: 'areal', timeLabel: 'retarded', junkEndM: burstOverM, binary: binaryFacts(mergerRequest) })]),
      ),
      claims: [
        { id: 'C1', quantity: 'remnant-mass', of: claimOf, settings: { method: 'balance-pn' }, claimed: '0.961(2)', tolerance: 0.002 },
        { id: 'C2', quantity: 'remnant-spin', of: claimOf, settings: { method: 'balance-pn' }, claimed: '0.625(10)', tolerance: 0.01 },
        { id: 'C3', quantity: 'convergence-order', of: { series }, claimed: '4.0' },
        { id: 'C4', quantity: 'extrapolated-value', of: { series }, settings: { observable: 'radiated-energy' }, claimed: '0.0285(4)' },
        { id: 'C5', quantity: 'radius-extrapolation', of: { series }, settings: { observable: 'radiated-energy', extrapolationOrder: 2 }, claimed: '0.0290(5)' },
      ],
    }),
    ...runs.map(({ name, n, radius, wave }) => modesFile(`${name}.txt`, `Larkfield Wave Group, Tinderbox run 44, ${n} points, areal radius ${radius} M`, mergerRequest, wave)),
  ];
}
