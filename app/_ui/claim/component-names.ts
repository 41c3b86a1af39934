/** What comes with a number, in words: how each component of a point is labelled and in which unit it stands. */
interface ComponentWords {
  readonly label: string;
  /** Empty without one; `value` for that of the claimed number itself. */
  readonly unit: string;
}

const VALUE = 'value';
const words: Readonly<Record<string, readonly [label: string, unit: string]>> = {
  timeShiftS: ['Shift of b in time', 's'],
  timeShiftM: ['Shift of b in time', 'M'],
  phaseShiftRad: ['Shift of b in phase', 'rad'],
  polarisationRad: ['Polarisation angle of b', 'rad'],
  inclinationRad: ['Inclination', 'rad'],
  azimuthRad: ['Azimuth', 'rad'],
  massAt: ['Mass of the template', 'Msun'],
  templateMassMsun: ['Mass of the best template', 'Msun'],
  bestTemplate: ['Best template, counted from 0', ''],
  mismatch: ['Mismatch', ''],
  rhoWithAmplitude: ['With the actual amplitudes', ''],
  rhoInd: ['Loudness at which they part', ''],
  chiEffA: ['Effective spin of a', ''],
  chiEffB: ['Effective spin of b', ''],
  edgeLow: ['Lower edge, in spin', ''],
  edgeHigh: ['Upper edge, in spin', ''],
  points: ['Sampled points', ''],
  spectrumPeakHz: ['Peak of the spectrum', 'Hz'],
  rhoA: ['Loudness of a', ''],
  rhoB: ['Loudness of b', ''],
  rhoBelow: ['Loudness below the join', ''],
  rhoAbove: ['Loudness above the join', ''],
  amplitudeRatioAtJoin: ['Numerical over post-Newtonian amplitude at the join', ''],
  redshift: ['Redshift', ''],
  redshiftA: ['Redshift of a', ''],
  redshiftB: ['Redshift of b', ''],
  distanceMpc: ['Luminosity distance', 'Mpc'],
  rootCount: ['Roots found', ''],
  lowestRoot: ['Lowest root', VALUE],
  before: ['Added for what was radiated before the start', VALUE],
  x: ['Along x', 'M^2'],
  y: ['Along y', 'M^2'],
  z: ['Along z', 'M^2'],
  vx: ['Along x', 'km/s'],
  vy: ['Along y', 'km/s'],
  vz: ['Along z', 'km/s'],
  inPlane: ['In the plane of the orbit', 'km/s'],
  directionDeg: ['Direction in the plane, in the file’s axes', 'deg'],
  timeM: ['At the time', 'M'],
  atM: ['Read at the time', 'M'],
  ergPerS: ['The same', 'erg/s'],
  checkRingdown: ['From the ringing, as a check', VALUE],
  halfRange: ['Half the range of the fits', VALUE],
  predicted: ['Predicted from the remnant', VALUE],
  tauM: ['Damping time', 'M'],
  referenceFrequency: ['Orbital frequency at the start of the window', 'rad/M'],
  phase: ['Order of the phase', ''],
  amplitude: ['Order of the amplitude', ''],
  complex: ['Order of the complex difference', ''],
  pointwiseMedian: ['Order point by point, median', ''],
  pointwiseRange: ['Order point by point, between the quartiles', ''],
  ratio: ['Ratio of the two differences', ''],
  coarseDifference: ['Coarsest less middle run', ''],
  fineDifference: ['Middle less finest run', ''],
  coarseDifferenceRad: ['Coarsest less middle run', 'rad'],
  fineDifferenceRad: ['Middle less finest run', 'rad'],
  order: ['Order used', ''],
  measuredOrder: ['Order measured on three runs', ''],
  finest: ['Of the finest run', VALUE],
  errorEstimate: ['Estimated error of the finest run', VALUE],
  previousOrder: ['With one degree less', VALUE],
  largestRadius: ['At the largest radius', VALUE],
  checkPerturbative: ['From perturbation theory at the largest radius, as a check', VALUE],
  erg: ['The same', 'erg'],
  fieldHat: ['Field in units of the mass', ''],
  peakErgPerS: ['Peak of the luminosity', 'erg/s'],
  emEnergy: ['Electromagnetic energy, of M', ''],
  gwEnergy: ['Gravitational energy, of M', ''],
  scatter: ['Scatter about the line, in ln E', ''],
  cutoffHz: ['Cut-off of the plasma', 'Hz'],
  massLimitMsun: ['Mass below which the waves would pass', 'Msun'],
  checkPredictedHz: ['Predicted from the remnant, as a check', 'Hz'],
  meanRatio: ['Mean ratio of the amplitudes', ''],
  phaseRms: ['Scatter of the phases', 'rad'],
  accretionErgPerS: ['Luminosity of the accretion', 'erg/s'],
  coolingS: ['Cooling time', 's'],
  dynamicalS: ['Dynamical time', 's'],
};

const fits: Readonly<Record<string, string>> = {
  pan2011: 'Pan et al. 2011',
  husa2016: 'Husa et al. 2016',
  healy2014: 'Healy, Lousto & Zlochower 2014',
  jimenez2017: 'Jiménez-Forteza et al. 2017',
  buonanno2008: 'Buonanno, Kidder & Lehner 2008',
  keitel2017: 'Keitel et al. 2017',
  healy2017: 'Healy & Lousto 2017',
  campanelli2007: 'Campanelli et al. 2007',
};

const ofMode: Readonly<Record<string, string>> = { E: 'Energy in', rho2: 'Share of ρ² in' };

/** `somethingNewHz` → `Something new hz`: a name the table does not know is still readable. */
const fromName = (name: string): string => name.replace(/([A-Z])/g, ' $1').toLowerCase().replace(/^./, (c) => c.toUpperCase());

/** Label and unit of a component of a claim whose number is in `unit`. */
export function componentWords(name: string, quantity: string, unit: string): ComponentWords {
  const [, of = '', l, m = ''] = /^(E|rho2):(\d+),(-?\d+)$/.exec(name) ?? [];
  if (of !== '') return { label: `${ofMode[of]} (${l},${m.replace('-', '−')})`, unit: of === 'E' ? unit : '' };
  const fit = fits[name];
  if (fit) return { label: fit, unit };
  if (name === 'start' || name === 'radiated') return balanceWords(name, quantity);
  if (name === 'ratio' && quantity === 'em-frequency') return { label: 'Over the cut-off of the plasma', unit: '' };
  const [label, inUnit] = words[name] ?? [fromName(name), ''];
  return { label, unit: inUnit === VALUE ? unit : inUnit };
}

function balanceWords(name: 'start' | 'radiated', quantity: string): ComponentWords {
  const isSpin = quantity === 'remnant-spin';
  const what = isSpin ? 'angular momentum' : 'mass';
  return { label: name === 'start' ? `At the start, ${what}` : `Radiated, ${what}`, unit: isSpin ? 'M^2' : 'M' };
}
