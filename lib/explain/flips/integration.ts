import { inForce, isSwept, numberInForce, takes } from './flip-context';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

export const integrationFloor: FlipsOfConvention = (context) => {
  const now = numberInForce(context, 'integrationFloor');
  if (!takes(context, 'integrationFloor') || now === null) return [];
  const others = [...new Set([0.5 * now, 2 * now, 0.05, 0.08, 0.1, 0.15, 0.3].map((floor) => Number(floor.toPrecision(6))))];
  return makeFlips(context, others.filter((floor) => Math.abs(floor / now - 1) > 1e-3).map((floor) => ({
    convention: 'C30', option: `integrationFloor=${floor}`, setting: 'integrationFloor', clause: `frequencies below ω₀ = ${floor}/M are cut when ψ₄ is integrated`, change: { kind: 'rerun', settings: { integrationFloor: floor } },
  })));
};

/** From the first sample, from behind the burst of the start, or 100 M later still. */
export const startOfIntegral: FlipsOfConvention = (context) => {
  const now = numberInForce(context, 'startM');
  const [waveform] = context.waveforms;
  if (!takes(context, 'startM') || now === null || waveform === undefined) return [];
  const [first = 0] = waveform.axis;
  const last = waveform.axis.at(-1) ?? first;
  const places = [{ at: first, option: 'first', words: 'from the first sample on' }, ...(waveform.junkEndM === null ? [] : [{ at: waveform.junkEndM, option: 'junk-end', words: 'from the declared end of the start-up burst on' }]),
    ...[100, 150, 200].map((later) => ({ at: first + later, option: `first+${later}`, words: `from ${later} M after the first sample on` }))];
  return makeFlips(context, places.filter(({ at }) => Math.abs(at - now) > 1e-9 && at < last).map(({ at, option, words }) => ({
    convention: 'C31', option, setting: 'startM', clause: `the integral runs ${words}`, change: { kind: 'rerun', settings: { startM: at } },
  })));
};

const before = { false: 'nothing is added for the time before the record', true: 'the energy lost before the record is added', removed: 'only what was cut off at the start is added back' } as const;

export const energyBefore: FlipsOfConvention = (context) => {
  const now = inForce(context, 'includeEnergyBeforeStart');
  const knowsRatio = numberInForce(context, 'massRatio') !== null || context.waveforms[0]?.binary.massRatio !== undefined;
  if (!takes(context, 'includeEnergyBeforeStart') || now === undefined) return [];
  return makeFlips(context, ([false, true, 'removed'] as const).filter((rule) => rule !== now && (rule === false || knowsRatio)).map((rule) => ({
    convention: 'C32', option: `includeEnergyBeforeStart=${rule}`, setting: 'includeEnergyBeforeStart', clause: before[`${rule}`], change: { kind: 'rerun', settings: { includeEnergyBeforeStart: rule } },
  })));
};

const masses = { M: 'the initial mass M', adm: 'the mass of the whole spacetime', remnant: 'the mass of the remnant' } as const;

/** The mass by which energies and recoils are divided; which of the two conventions is named hangs on the quantity. */
export const normaliser: FlipsOfConvention = (context) => {
  const now = inForce(context, 'normaliseBy');
  const binary = context.waveforms[0]?.binary ?? {};
  if (!takes(context, 'normaliseBy') || typeof now !== 'string') return [];
  const known = { M: true, adm: binary.admEnergy !== undefined, remnant: binary.remnantMass !== undefined || context.claim.quantity.id === 'recoil' };
  return makeFlips(context, (['M', 'adm', 'remnant'] as const).filter((mass) => mass !== now && known[mass]).map((mass) => ({
    convention: context.claim.quantity.id === 'recoil' ? 'C46' : 'C33', option: `normaliseBy=${mass}`, setting: 'normaliseBy', clause: `it is referred to ${masses[mass]}`, change: { kind: 'rerun', settings: { normaliseBy: mass } },
  })));
};

/** How two records are laid over each other, and where their difference is read. */
export const alignment: FlipsOfConvention = (context) => {
  const now = inForce(context, 'alignment');
  if (!takes(context, 'alignment') || now === undefined) return [];
  const words = { window: 'the records are aligned over the window', peak: 'the records are aligned at their peaks', none: 'the records are compared as stored, without an alignment' } as const;
  const aligned = (['window', 'peak', 'none'] as const).filter((way) => way !== now).map((way): FlipDraft => ({ convention: 'C45', option: `alignment=${way}`, setting: 'alignment', clause: words[way], change: { kind: 'rerun', settings: { alignment: way } } }));
  const read = inForce(context, 'at');
  const places = takes(context, 'at') && !isSwept(context, 'at') ? (['peak', 'end', 'maximum'] as const).filter((place) => place !== read).map((place): FlipDraft => ({ convention: 'C45', option: `at=${place}`, setting: 'at', clause: `the difference is read at the ${place === 'maximum' ? 'largest value up to the peak' : place === 'end' ? 'end of the records' : 'peak'}`, change: { kind: 'rerun', settings: { at: place } } })) : [];
  return makeFlips(context, [...aligned, ...places]);
};

const methods = { 'balance-adm': 'the balance starts from the stated energy of the whole spacetime', 'balance-pn': 'the balance starts from the post-Newtonian energy at the first frequency', ringdown: 'the remnant is read off its ringing' } as const;

export const startOfBalance: FlipsOfConvention = (context) => {
  const now = inForce(context, 'method');
  const { admEnergy, massRatio } = context.waveforms[0]?.binary ?? {};
  if (!takes(context, 'method') || typeof now !== 'string') return [];
  const known = { 'balance-adm': admEnergy !== undefined, 'balance-pn': massRatio !== undefined, ringdown: true };
  return makeFlips(context, (['balance-adm', 'balance-pn', 'ringdown'] as const).filter((method) => method !== now && known[method]).map((method) => ({
    convention: 'C32', option: `method=${method}`, setting: 'method', clause: methods[method], change: { kind: 'rerun', settings: { method } },
  })));
};

export const integrationFlips: readonly FlipsOfConvention[] = [integrationFloor, startOfIntegral, energyBefore, normaliser, alignment, startOfBalance];
