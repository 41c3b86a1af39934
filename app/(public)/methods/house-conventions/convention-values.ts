import { END_CYCLES, OPEN_FRACTION, START_CYCLES } from '@/lib/engine/conditioning/taper-window';
import { houseValues } from '@/lib/engine/contract/house-values';
import { EDDINGTON_ERG_PER_S, FIELD_UNIT_GAUSS, PLASMA_HZ } from '@/lib/engine/electromagnetic/em-units';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { C_M_PER_S, GMSUN_M3_PER_S2, MPC_M, MSUN_S } from '@/lib/engine/units/constants';
import { EVEN_TO } from '@/lib/formats/axis';

/** As TeX, so that a power stands as one. */
const spelt = (value: number): string => {
  const [digits = '', power] = (Math.abs(value) < 1e-2 || Math.abs(value) >= 1e12 ? value.toExponential() : String(value)).split('e');
  return power === undefined ? digits : `${digits === '1' ? '' : `${digits}\\times`}10^{${Number(power)}}`;
};

/** Numbers of the conventions page, from the constants by which the engine computes. */
const values: Readonly<Record<string, string>> = {
  msunSeconds: spelt(Number(MSUN_S.toPrecision(13))),
  gmSun: spelt(GMSUN_M3_PER_S2),
  c: spelt(C_M_PER_S),
  megaparsec: spelt(MPC_M),
  h0: spelt(houseValues.cosmology.h0),
  omegaM: spelt(houseValues.cosmology.omegaM),
  y22FaceOn: spinWeightedHarmonic(2, 2, 0, 0).re.toFixed(6),
  openFraction: spelt(OPEN_FRACTION),
  startCycles: spelt(START_CYCLES),
  endCycles: spelt(END_CYCLES),
  uniformStep: spelt(EVEN_TO),
  fieldUnit: spelt(FIELD_UNIT_GAUSS),
  eddington: spelt(EDDINGTON_ERG_PER_S),
  plasma: spelt(PLASMA_HZ),
  maximise: houseValues.maximise.join(' and '),
};

/** A text that asks for a number nobody has does not get written. */
export const withValues = (text: string): string =>
  text.replace(/\{\{(\w+)\}\}/g, (_, name: string) => {
    const value = values[name];
    if (value === undefined) throw new Error(`the conventions ask for a value that is not there: ${name}`);
    return value;
  });
