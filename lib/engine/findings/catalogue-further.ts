import type { CatalogueRow } from './catalogue';

const stops = [{ level: 'stops-lodging' }] as const;
const look = [{ level: 'worth-a-look' }] as const;

const stop = (code: string, concerns: string, rule: string, advice: string): CatalogueRow => ({ code, numbers: [], part: 'stops', levels: stops, concerns, rule, advice });

/** What single quantities add to the list of validations. */
export const furtherRows: readonly CatalogueRow[] = [
  {
    code: 'engine/peak-at-edge', numbers: [], part: 'sampling', levels: look, concerns: 'peak luminosity; disc luminosity',
    rule: 'The curve is largest at an end of the interval; the number is a lower bound.',
    advice: 'Supply the record around its peak, or declare an earlier startM.',
  },
  {
    code: 'engine/mass-ratio-assumed', numbers: [], part: 'sampling', levels: look, concerns: 'detectable fraction',
    rule: 'No signal states its mass ratio; over the plane of spins equal masses are assumed.',
    advice: 'Give binary.massRatio beside the signals.',
  },
  {
    code: 'engine/join-in-taper', numbers: [], part: 'sampling', levels: look, concerns: 'hybrid loudness',
    rule: 'The join lies below the frequency at which the numerical signal has come in fully.',
    advice: 'Join at a higher frequency, or attach a waveform that starts earlier.',
  },
  {
    code: 'engine/several-roots', numbers: [], part: 'sampling', levels: look, concerns: 'horizons',
    rule: 'The loudness crosses the threshold at several redshifts; the largest is given.',
    advice: 'Say in the statement which one is meant.',
  },
  {
    code: 'engine/alignment-degenerate', numbers: [], part: 'runs', levels: look, concerns: 'phase and amplitude differences',
    rule: 'In the window of the alignment the frequency hardly changes, so that a shift of time cannot be told from a phase; the smallest shift is used.',
    advice: 'Declare a window in which the frequency changes, or alignment: peak.',
  },
  {
    code: 'engine/no-single-order', numbers: [], part: 'runs', levels: look, concerns: 'order of convergence',
    rule: 'The quartiles of the orders measured point by point lie more than 1 apart.',
    advice: 'Supply another resolution, or claim the difference of the two best runs.',
  },
  {
    code: 'engine/runs-left-out', numbers: [], part: 'runs', levels: [{ level: 'note' }], concerns: 'orders and extrapolations',
    rule: 'The series holds runs that differ in resolution and in radius; those that differ in one of them alone are compared.',
    advice: 'Nothing, if these are the runs that are meant; else give them a series of their own.',
  },
  {
    code: 'engine/coordinate-radius', numbers: [], part: 'runs', levels: look, concerns: 'radius extrapolation',
    rule: 'Radii are stated as coordinate radii and used as they stand; a coordinate radius may lie some M off the areal one.',
    advice: 'State areal radii.',
  },
  {
    code: 'engine/time-label', numbers: [], part: 'runs', levels: look, concerns: 'radius extrapolation',
    rule: 'Times are coordinate times, and the number begins or ends at a stated time: at each radius that is another moment of the source.',
    advice: 'Give the records against retarded time, or a junkEndM for each.',
  },
  {
    code: 'engine/fit-beyond-range', numbers: [], part: 'facts', levels: look, concerns: 'published fits',
    rule: 'The mass ratio or a spin lies beyond the simulations from which a fit was made.',
    advice: 'Say in the statement that the fit is extrapolated.',
  },
  {
    code: 'engine/few-orbits', numbers: [], part: 'sampling', levels: look, concerns: 'eccentricity',
    rule: 'The window holds fewer than three orbits: the smooth fit follows the oscillation itself.',
    advice: 'Declare a longer window.',
  },
  {
    code: 'engine/ringdown-against-balance', numbers: [], part: 'facts', levels: look, concerns: 'remnant mass and spin',
    rule: 'The remnant by balance and the one by its ringing are further apart than both allow.',
    advice: 'Check the start values, the modes and the window of the ringdown.',
  },
  {
    code: 'engine/early-plateau', numbers: [], part: 'fields', levels: look, concerns: 'electromagnetic energies',
    rule: 'Before the signal |φ₂|² exceeds 10⁻⁴ of its peak: a background that is not subtracted.',
    advice: 'Subtract the background, or say that it is meant to be in the number.',
  },
  {
    code: 'engine/per-field', numbers: [], part: 'fields', levels: [{ level: 'note' }], concerns: 'electromagnetic energies',
    rule: 'The file is per unit of field and the claim names no field: the number is an energy over the square of the field.',
    advice: 'Declare fieldGauss and totalMassMsun for an energy.',
  },
  {
    code: 'engine/short-window', numbers: [], part: 'fields', levels: look, concerns: 'mirroring',
    rule: 'The two records do not share the whole window around the peak; the ratio is taken over the part that they share.',
    advice: 'Supply longer records, or declare a window inside both.',
  },
  {
    code: 'engine/masses-differ', numbers: [], part: 'fields', levels: look, concerns: 'exponent of the field',
    rule: 'The files of the series do not state one total mass; part of the slope may be the mass’s.',
    advice: 'Compare runs at one total mass.',
  },
  {
    code: 'engine/below-cutoff', numbers: [], part: 'fields', levels: [{ level: 'note' }], concerns: 'electromagnetic frequency',
    rule: 'The frequency lies below the cut-off of the plasma: the waves are emitted and do not arrive.',
    advice: 'Claim what is emitted, or declare the density that is meant.',
  },
  {
    code: 'engine/above-eddington', numbers: [], part: 'fields', levels: [{ level: 'note' }], concerns: 'disc luminosity',
    rule: 'The curve peaks above the Eddington luminosity of the declared mass.',
    advice: 'Say how the gas is held.',
  },
  {
    code: 'engine/accretion-balance', numbers: [], part: 'fields', levels: look, concerns: 'disc luminosity',
    rule: 'The declared accretion rate and efficiency give another luminosity than the curve.',
    advice: 'Check both, or say where the rest of the energy comes from.',
  },
  {
    code: 'engine/cools-at-once', numbers: [], part: 'fields', levels: look, concerns: 'disc luminosity',
    rule: 'At its peak the disc would radiate its internal energy before the gas moves once: the emission rule contradicts its own assumptions.',
    advice: 'Let the gas cool in the simulation, or claim the luminosity as an upper bound.',
  },
  stop('engine/no-signal', 'all', 'There is nothing to compute from: no signal in the modes, along the line of sight, in the band or in the window of the claim.', 'Check modes, response, line of sight, band and window.'),
  stop('engine/too-few-points', 'detectors; detectable fraction', 'A record has fewer than 16 samples, or fewer than 5 signals stand for a family.', 'Attach more.'),
  stop('engine/unequal-spins', 'detectable fraction', 'The two spins of a signal differ, or are not stated.', 'List signals with equal spins.'),
  stop('engine/same-spin-twice', 'detectable fraction', 'Two signals have the same spin.', 'Leave one of them out.'),
  stop('engine/mass-ratios-differ', 'detectable fraction', 'Over the plane of spins, the signals have different mass ratios.', 'List signals of one mass ratio, or declare weight: diagonal.'),
  stop('engine/curve-already-averaged', 'loudness', 'An average over the sky is asked for on a curve that contains it.', 'Leave out "average", or name a curve of the instrument alone.'),
  stop('engine/average-needs-modes', 'loudness', 'An average over orientations is asked for of a strain along one line of sight.', 'Attach the modes, or claim the average "sky".'),
  stop('engine/no-horizon', 'horizons', 'Between z = 0.001 and 50 the loudness does not cross the threshold.', 'Check mass, threshold and band.'),
  stop('engine/not-a-strain', 'detectors', 'The file holds a variable from which no strain follows.', 'Attach strain, news or ψ₄.'),
  stop('engine/mass-not-rescalable', 'detectors', 'A source-frame mass is asked of a physical strain without a mass and distance of its own.', 'Give totalMassMsun and distanceMpc beside the file, or declare massFrame: detector.'),
  stop('engine/setting-missing', 'all', 'A mass or redshift that scales the number is not known.', 'Declare it.'),
  stop('engine/records-far-apart', 'overlaps', 'Two records share no time, and nothing may be shifted.', 'Shift one of the files, or claim a match.'),
  stop('engine/too-many-lines', 'detectors', 'The product of two spectra would need more frequencies than are held.', 'Narrow the band, or attach a series in time.'),
  stop('engine/polarisation-needs-complex', 'matches', 'The polarisation is maximised over while only one is used.', 'Declare response: complex, or leave out "polarisation".'),
  stop('engine/inclination-needs-modes', 'matches', 'The inclination is maximised over for a strain along one line of sight.', 'Attach the modes, or leave out "inclination".'),
  stop('engine/search-too-wide', 'mode content; degeneracy', 'A search over the template’s mass would tabulate more products of modes than a claim may cost; the text counts them.', 'Narrow templateMassRange, name fewer modes, declare inclinationRad, lower fHighHz, or shorten the record.'),
  stop('engine/no-modes', 'mode content', 'The quantity compares modes, and the file holds a strain along one line of sight.', 'Attach the modes.'),
  stop('engine/hybrid-face-on', 'hybrid loudness', 'The post-Newtonian part is known face-on in the plus polarisation alone.', 'Leave the setting out.'),
  stop('engine/normaliser-missing', 'sums over modes; ringdown', 'The number is referred to a mass that the sheet does not state.', 'State it under "binary", or refer the number to M.'),
  stop('engine/start-missing', 'remnant mass and spin', 'The balance begins with values that the sheet does not state.', 'State admEnergy and admAngularMomentum, or declare method: balance-pn.'),
  stop('engine/fit-not-applicable', 'published fits', 'The fit does not give this number, or was made for bodies without spin.', 'Declare fit: mean, or another fit.'),
  stop('engine/no-order', 'orders and extrapolations', 'There are fewer than three resolutions, unknown or equal spacings, differences no larger than rounding, or no positive order up to 20.', 'Supply three different resolutions; for an extrapolation declare formalOrder.'),
  stop('engine/no-field', 'electromagnetic energies', 'Rescaling is asked for and the field or mass of the computation is not stated.', 'State fieldGauss and totalMassMsun beside the file.'),
  stop('engine/defect', 'all', 'The computation met a condition that it does not foresee. It fails closed; other claims of the sheet go on.', 'It is a fault of the program: report it with the sheet.'),
];
