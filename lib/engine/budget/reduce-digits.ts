import type { Mode, Waveform } from '@/lib/engine/contract/waveform';

/** Rounds every value to so many significant digits; neighbours share a decade, so the scale is found by comparison. */
function rounded(values: Float64Array, digits: number): Float64Array {
  const out = new Float64Array(values.length);
  let low = 1;
  let high = 10;
  let scale = 10 ** (digits - 1);
  for (let i = 0; i < values.length; i++) {
    const size = Math.abs(values[i]!);
    // Below 1e-280 the scale itself would overflow; such values weigh nothing beside any peak.
    if (size < 1e-280 || !Number.isFinite(size)) {
      out[i] = values[i]!;
      continue;
    }
    if (size < low || size >= high) {
      const decade = Math.floor(Math.log10(size));
      low = 10 ** decade;
      high = 10 ** (decade + 1);
      scale = 10 ** (digits - 1 - decade);
    }
    out[i] = Math.round(values[i]! * scale) / scale;
  }
  return out;
}

/**
 * The same waveform printed with fewer significant digits.
 * Shape:  same axis and modes.
 * Units:  the waveform's own.
 * Error:  none; this is the perturbation by which rounding of the input is measured.
 * Fails:  never.
 * Source: house rule: a tenth of what one digit less changes.
 */
export function withFewerDigits(waveform: Waveform, digits: number): Waveform {
  const { content } = waveform;
  const maybe = (values: Float64Array | null | undefined): Float64Array | null => (values ? rounded(values, digits) : null);
  if (content.kind === 'modes') {
    const modes = content.modes.map((mode): Mode => ({ ...mode, re: rounded(mode.re, digits), im: rounded(mode.im, digits) }));
    return { ...waveform, content: { kind: 'modes', modes } };
  }
  const parts = content.plusIm ? { plusIm: rounded(content.plusIm, digits), crossIm: maybe(content.crossIm) } : {};
  return { ...waveform, content: { kind: 'line-of-sight', plus: rounded(content.plus, digits), cross: maybe(content.cross), ...parts } };
}
