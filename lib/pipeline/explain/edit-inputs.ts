import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { QuantityInputs } from '@/lib/engine/contract/quantity';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import type { InputEdit } from '@/lib/explain/flip';
import { masked } from './mask';

const TWO_PI = 2 * Math.PI;

const isNoiseEdit = (edit: InputEdit): boolean => edit.edit.startsWith('noise');

function editedCurve(curve: NoiseCurve, edit: InputEdit): NoiseCurve | null {
  const other = { ...curve, builtIn: null };
  switch (edit.edit) {
    case 'noise-power':
      return { ...other, psd: (f) => curve.psd(f) ** edit.power };
    case 'noise-times-frequency':
      return { ...other, psd: (f) => curve.psd(f) * f ** edit.power };
    case 'noise-angular':
      return { ...other, fLowHz: curve.fLowHz / TWO_PI, fHighHz: curve.fHighHz / TWO_PI, points: curve.points?.map((f) => f / TWO_PI) ?? null, psd: (f) => curve.psd(f * TWO_PI) };
    case 'noise-curve':
      return builtInCurve(edit.curve) ?? null;
    default:
      return curve;
  }
}

const negated = (x: Float64Array): Float64Array => x.map((y) => -y);
const conjugated = (mode: Mode): Mode => ({ ...mode, im: negated(mode.im) });
const signOf = (l: number): number => (l % 2 === 0 ? 1 : -1);
const times = (mode: Mode, sign: number): Mode => (sign === 1 ? mode : { ...mode, re: negated(mode.re), im: negated(mode.im) });

/** With the partners that the mirror rule of the house makes, where it is in force. */
function completed({ negativeM }: Waveform, modes: readonly Mode[]): readonly Mode[] {
  const hasNegative = modes.some(({ m }) => m < 0);
  if (negativeM === 'none' || negativeM === 'given' || (negativeM === null && hasNegative)) return modes;
  const has = (l: number, m: number): boolean => modes.some((mode) => mode.l === l && mode.m === m);
  return [...modes, ...modes.filter(({ l, m }) => m > 0 && !has(l, -m)).map((mode) => times({ ...conjugated(mode), m: -mode.m }, signOf(mode.l)))];
}

function editedModes(waveform: Waveform, edit: InputEdit): Waveform {
  const { content } = waveform;
  if (content.kind !== 'modes') {
    return edit.edit === 'conjugate' && content.cross !== null ? { ...waveform, content: { ...content, cross: negated(content.cross) } } : waveform;
  }
  const withModes = (modes: readonly Mode[], negativeM = waveform.negativeM): Waveform => ({ ...waveform, negativeM, content: { ...content, modes } });
  switch (edit.edit) {
    case 'conjugate':
      return withModes(content.modes.map(conjugated));
    case 'relabel-m':
      return withModes(completed(waveform, content.modes).map((mode) => ({ ...mode, m: -mode.m })), 'given');
    case 'mirror-sign':
      return withModes(completed(waveform, content.modes).map((mode) => (mode.m < 0 ? times(mode, signOf(mode.l)) : mode)), 'given');
    case 'drop-negative-m':
      return withModes(content.modes.filter(({ m }) => m >= 0), 'none');
    default:
      return waveform;
  }
}

function editedWaveform(waveform: Waveform, edit: InputEdit): Waveform {
  if (edit.edit === 'mask') return masked(waveform, edit);
  return edit.edit === 'variable' ? { ...waveform, variable: edit.variable } : editedModes(waveform, edit);
}

/**
 * Inputs under another meaning of a file. One edit of one waveform or curve is made once and kept, so that what the engine
 * keeps about it is found again at the next node.
 */
export class EditedInputs {
  private readonly waveforms = new WeakMap<Waveform, Map<string, Waveform>>();
  private readonly curves = new WeakMap<NoiseCurve, Map<string, NoiseCurve | null>>();

  /** Null where the edit leaves no curve. */
  apply(inputs: QuantityInputs, edits: readonly InputEdit[]): QuantityInputs | null {
    let current: QuantityInputs | null = inputs;
    for (const edit of edits) current = current === null ? null : this.applyOne(current, edit);
    return current;
  }

  private applyOne(inputs: QuantityInputs, edit: InputEdit): QuantityInputs | null {
    if (isNoiseEdit(edit)) {
      const noise = inputs.noise === null ? null : this.curve(inputs.noise, edit);
      return noise === null ? null : { of: inputs.of, noise };
    }
    const touches = (role: string): boolean => edit.edit !== 'conjugate' || edit.roles.includes(role);
    const one = (given: Waveform): Waveform => this.waveform(given, edit);
    const of = Object.fromEntries(Object.entries(inputs.of).map(([role, given]) => [role, !touches(role) ? given : Array.isArray(given) ? (given as readonly Waveform[]).map(one) : one(given as Waveform)]));
    return { of, noise: inputs.noise };
  }

  private waveform(given: Waveform, edit: InputEdit): Waveform {
    const shelf = this.waveforms.get(given) ?? new Map<string, Waveform>();
    this.waveforms.set(given, shelf);
    const key = edit.edit === 'conjugate' ? edit.edit : JSON.stringify(edit);
    const made = shelf.get(key) ?? editedWaveform(given, edit);
    shelf.set(key, made);
    return made;
  }

  private curve(given: NoiseCurve, edit: InputEdit): NoiseCurve | null {
    const shelf = this.curves.get(given) ?? new Map<string, NoiseCurve | null>();
    this.curves.set(given, shelf);
    const key = JSON.stringify(edit);
    const known = shelf.get(key);
    if (known !== undefined) return known;
    const made = editedCurve(given, edit);
    shelf.set(key, made);
    return made;
  }
}
