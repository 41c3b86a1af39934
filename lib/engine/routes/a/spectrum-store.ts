import type { TaperWindow } from '@/lib/engine/contract/route';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { frequencySource, type FrequencySource } from './frequency-source';
import { noiseWeigher, type NoiseWeigher } from './noise-weigher';
import type { Spectrum } from './spectrum';
import type { SweepMemory } from './sweep-memory';
import { timeSource, type Samples, type TimeSource } from './time-source';

/** Spectra of one waveform that are kept: a mass-free search needs few, a search over the template's mass many once. */
const MOST_SPECTRA = 40;
/** Bins kept for one waveform: with what is derived from them about 250 MB. Noise with lines can ask for a million bins a spectrum. */
const MOST_BINS = 1 << 22;

/** A record on its uniform grid. */
export interface WindowedSeries {
  readonly samples: Samples;
  readonly weights: Float64Array;
}

const MOST_SERIES = 2;

interface Shelf {
  time?: TimeSource;
  frequency?: FrequencySource;
  /** Halvings of the step that this waveform was found to need. */
  halvings: number;
  /** Halvings of the bin spacing that this waveform was found to need. */
  paddings: number;
  readonly spectra: Map<string, Spectrum>;
  /** The last series that were resampled and windowed: spectra on other bins start from them. */
  readonly series: Map<string, WindowedSeries>;
  /** Sweeps over mass in which this waveform stands first. */
  readonly sweeps: SweepMemory[];
}

/**
 * What route A keeps between the points of one measurement, keyed by the objects themselves so that
 * it is forgotten with them. Variants of the route that differ in one knob share what that knob leaves alone.
 */
export class SpectrumStore {
  private readonly shelves = new WeakMap<Waveform, Shelf>();
  private readonly weighers = new WeakMap<NoiseCurve, Map<number, NoiseWeigher>>();

  private shelf(waveform: Waveform): Shelf {
    const known = this.shelves.get(waveform);
    if (known) return known;
    const made: Shelf = { halvings: 0, paddings: 0, spectra: new Map(), series: new Map(), sweeps: [] };
    this.shelves.set(waveform, made);
    return made;
  }

  time(waveform: Waveform): TimeSource {
    const shelf = this.shelf(waveform);
    return (shelf.time ??= timeSource(waveform));
  }

  frequency(waveform: Waveform): FrequencySource {
    const shelf = this.shelf(waveform);
    return (shelf.frequency ??= frequencySource(waveform));
  }

  halvings(waveform: Waveform): number {
    return this.shelf(waveform).halvings;
  }

  halve(waveform: Waveform): void {
    this.shelf(waveform).halvings++;
  }

  paddings(waveform: Waveform): number {
    return this.shelf(waveform).paddings;
  }

  pad(waveform: Waveform, paddings: number): void {
    this.shelf(waveform).paddings = paddings;
  }

  series(waveform: Waveform, key: string, make: () => WindowedSeries): WindowedSeries {
    const { series } = this.shelf(waveform);
    const made = series.get(key) ?? make();
    for (const oldest of series.keys()) if (series.size >= MOST_SERIES && oldest !== key) series.delete(oldest);
    series.set(key, made);
    return made;
  }

  sweeps(waveform: Waveform): SweepMemory[] {
    return this.shelf(waveform).sweeps;
  }

  spectrum(waveform: Waveform, key: string, make: () => Spectrum): Spectrum {
    const { spectra } = this.shelf(waveform);
    const known = spectra.get(key);
    if (known) return known;
    const made = make();
    let bins = made.zRe.length;
    for (const kept of spectra.values()) bins += kept.zRe.length;
    for (const [oldest, { zRe }] of spectra) {
      if (spectra.size < MOST_SPECTRA && bins <= MOST_BINS) break;
      spectra.delete(oldest);
      bins -= zRe.length;
    }
    spectra.set(key, made);
    return made;
  }

  weigher(curve: NoiseCurve, halvings: number): NoiseWeigher {
    const byStep = this.weighers.get(curve) ?? new Map<number, NoiseWeigher>();
    this.weighers.set(curve, byStep);
    const known = byStep.get(halvings);
    if (known) return known;
    const made = noiseWeigher(curve, halvings);
    byStep.set(halvings, made);
    return made;
  }
}

export const taperKey = ({ start, end }: TaperWindow): string => `${start?.from},${start?.to},${end?.from},${end?.to}`;
