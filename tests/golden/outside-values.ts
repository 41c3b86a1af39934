/**
 * Where every outside value is held: the id, then the test file below tests/ and words of the test's title; or, where a value does not
 * apply to this engine, why. outside-values.test.ts holds the table to the list of checks and to the tests.
 */
export type Held = readonly [file: string, title: string];
export type Place = Held | { readonly because: string };

/** Some ids stand for many titles made from one list. */
const all = (ids: string, file: string, title: string): readonly (readonly [string, Place])[] => ids.split(' ').map((id) => [id, [file, title]]);

/** Published values. */
export const checks: ReadonlyMap<string, Place> = new Map([
  ...all('F1 F2 F3 F6 F7 F8', 'golden/constants', 'constants'),
  ...all('F4', 'golden/flux-closed-forms', 'c⁵/G in erg/s'),
  ...all('F5 E1 E2 E3 E4 E6', 'golden/electromagnetic', 'units of fields, plasmas and light'),
  ...all('E5', 'golden/electromagnetic', 'go with the square of the field'),
  ...all('E7', 'golden/electromagnetic', 'a flux S₀ sin²θ of an l = 1 wave'),
  ...all('A1 A2 A3 A4 A5', 'golden/noise-curves', 'published noise curves, power density'),
  ...all('A6 A7', 'golden/noise-curves', 'published noise curves that come as tables'),
  ...all('B1', 'golden/stationary-phase-snr', 'the stationary-phase amplitude'),
  ...all('B2 B3 B12', 'golden/stationary-phase-snr', 'stationary-phase loudness, route $name'),
  ...all('B4 B5', 'golden/published-ranges', 'averages over sky and orientation'),
  ...all('B6 B7', 'golden/published-ranges', 'horizon with %s from %d Hz'),
  ...all('B8a B8b B8c B9', 'golden/published-ranges', 'range with %s is %d ± %d Mpc'),
  ...all('B10', 'golden/published-ranges', 'are heard with 139.7 in four years'),
  ...all('B11', 'golden/published-ranges', 'twice as loud is eight times the volume'),
  ...all('C1 C2 C3 C4', 'golden/overlaps', 'overlaps with closed forms, route $name'),
  ...all('C5', 'golden/published-ranges', 'loses %d of the events'),
  ...all('C6 C7', 'golden/published-ranges', 'the largest indistinguishable mismatch'),
  ...all('C8', 'golden/published-ranges', 'against 3.5PN, 10 + 1.4'),
  ...all('C9', 'golden/published-ranges', 'a chirp mass higher by'),
  ...all('D1', 'golden/flux-closed-forms', 'fluxes against closed forms, route %s'),
  ...all('D2 D3', 'golden/energy', 'radiated energy against closed forms, route %s'),
  ...all('D5', 'golden/flux-closed-forms', 'five modes of news that stand still'),
  ...all('D6', 'golden/flux-closed-forms', 'comes from ψ₄ of a tapered tone'),
  ...all('D7 D8 D9', 'golden/quasi-normal', 'Mω_R by the engine'),
  ...all('D10 D11 D12 D13 D14 D18 D19 D20', 'golden/remnant-fits', 'mean of the masses'),
  ...all('D16a D16b D16c', 'golden/remnant-fits', 'a surrogate of another family'),
  ...all('D17', 'golden/remnant-fits', 'without spin kick hardest'),
  ...all('H1', 'golden/grid-convergence', 'constant ratio 2 gives order'),
  ...all('H2', 'golden/grid-convergence', 'ratios 1.5 and 1.333 give order'),
  ...all('H3', 'golden/grid-convergence', 'at ratio 1.25 gives order 4'),
  ...all('G1', 'golden/detector-event', 'is found with loudness 18.6'),
  ...all('G1c', 'golden/detector-event', 'is found with loudness 24 by both'),
  ...all('G1d', 'golden/detector-event', 'would be heard to 1889.64'),
  ...all('G1e', 'golden/detector-event', 'arrives 6.9 ms later'),
  ...all('G3 G4 G8', 'golden/remnant-reference', 'leaves the mass and spin of its own metadata'),
  ...all('G5 G7', 'golden/flux-reference', 'peaks at 0.001021'),
  ...all('G6', 'golden/quasi-normal', 'Mω_R by the engine'),
  ...all('G9', 'golden/energy-reference', 'find the same energy in the simulation'),
  ...all('B13', 'golden/detector-event', 'are heard to 75 ± 3 % Mpc on average'),
]);

/** Identities of the domain reference, appendix C. */
export const identities: ReadonlyMap<string, Place> = new Map([
  ...all('T1', 'golden/energy', 'damped sinusoid in (2,±2)'),
  ...all('T2', 'golden/overlaps', 'match of damped exponentials'),
  ...all('T3', 'golden/stationary-phase-snr', 'in white noise of'),
  ...all('T4', 'properties/vector-fluxes', 'the momentum of random modes'),
  ...all('T5', 'golden/grid-convergence', 'any p and the value 1'),
  ...all('T6', 'properties/vector-fluxes', 'what is radiated turns as a vector'),
  ...all('T7', 'unit/engine/units/cosmology', 'closed form (2c/H₀)'),
  ...all('T8', 'golden/published-ranges', 'averages over sky and orientation'),
  ...all('T9', 'unit/engine/quantities/loudness-by-hand', 'doubling the distance halves it'),
  ...all('T10', 'properties/inner-products', 'moved by any part of a sample'),
  ...all('T11', 'properties/inner-products', 'of two identical signals misses 1'),
  ...all('T12', 'properties/inner-products', 'grows with the strain'),
  ...all('T13', 'golden/identities', 'a file in another convention'),
  ...all('T14', 'golden/quasi-normal', 'has every printed digit of the table'),
  ...all('T15', 'golden/remnant-fits', 'has every printed digit by route'),
  ...all('T16', 'golden/identities', 'the same inputs'),
]);

/** Scenarios of the domain reference, section 7. */
export const scenarios: ReadonlyMap<string, Place> = new Map([
  ...all('D1', 'golden/scenarios', 'from 30 Hz are the three that were claimed'),
  ...all('D2', 'golden/scenarios', 'with the amplitude density read as power density'),
  ...all('D3', 'golden/specimen-numbers', 'recomputes 36.30'),
  ...all('D4', 'golden/scenarios', 'is 41.30 where'),
  ...all('D5', 'golden/energy-start-burst', 'leaves 0.0399 when'),
  ...all('D6', 'golden/specimen-numbers', 'finds the stated 0.18 rad understated'),
  ...all('D7', 'golden/flux-closed-forms', 'leave a remnant of 2:1'),
  ...all('D8', 'golden/specimen-numbers', 'agrees with 0.988942'),
  ...all('D9', 'golden/specimen-numbers', 'recomputes 1.0089e-15'),
  ...all('D10', 'golden/specimen-numbers', 'finds opposite spins told apart'),
  ...all('D11', 'golden/specimen-numbers', 'recomputes 65.3 %'),
  ...all('D12', 'golden/scenarios', 'falls to the threshold of 8'),
  ...all('D13', 'golden/specimen-numbers', 'agrees throughout, and its uncertainty covers'),
  ...all('D14', 'golden/scenarios', 'joined at 100 Hz is 42.7'),
  ...all('D15', 'golden/scenarios', 'is 29.41 with 0.0512'),
  ['D16', { because: 'It is about records after a change of the engine, not about a number of this one: lib/tools/recheck-records.ts decides, and the demonstration carries both cases.' }],
]);
