import type { Convention } from './convention';
import { banded } from './affected';
import { onLoud, onPair } from './measured-on';

/** Where integrals over frequency begin and end, and how a record is cut to fit them. */
export const bandConventions: readonly Convention[] = [
  {
    id: 'C04',
    title: 'Lower edge of the band',
    options: [{ id: 'stated', label: '8, 10, 12, 15, 20, 25, 30, 40 or 50 Hz' }, { id: 'waveform-start', label: 'where the waveform begins' }],
    effect: `Match 0.847 from 10 Hz, 0.866 from 15, 0.975 from 30, 0.992 from 40 (${onPair}). SNR between 1.025 and 0.852 times as large over the same edges (${onLoud}).`,
    kinds: ['rerun'],
    commonness: 'most',
    group: 'band',
    affects: banded,
    settings: ['fLowHz'],
    detect: 'The text; the first frequency of the waveform or of the curve.',
    sentence: 'Below its lower edge a band holds many cycles that decide a match, and usual values run from 8 to 50 Hz on the ground.',
  },
  {
    id: 'C05',
    title: 'Upper edge of the band',
    options: [{ id: 'nyquist', label: 'half the sampling rate' }, { id: 'stated', label: '1024 or 2048 Hz' }, { id: 'last-orbit', label: 'the last stable orbit' }, { id: 'ringdown', label: 'the ringdown' }, { id: 'curve-end', label: 'the end of the curve' }],
    effect: `Up to 128 Hz instead of the end: match 0.948 (${onPair}), SNR 0.891 times as large (${onLoud}).`,
    kinds: ['rerun'],
    commonness: 'regular',
    group: 'band',
    affects: banded,
    settings: ['fHighHz'],
    detect: 'How far the curve reaches, and how fast the series is sampled.',
    sentence: 'An integral may end at the last stable orbit, at the ringdown, or wherever samples or curve end.',
  },
  {
    id: 'C37',
    title: 'Taper',
    options: [{ id: 'none', label: 'no taper' }, { id: 'short', label: 'a short one' }, { id: 'long', label: 'a long one' }, { id: 'inside', label: 'one that reaches into the band' }],
    effect: `Without one: 0.0025 in match (${onPair}), 0.14 % more SNR (${onLoud}).`,
    kinds: ['rerun'],
    commonness: 'regular',
    group: 'band',
    affects: banded,
    settings: ['taper'],
    detect: 'The first sample: a jump from nothing.',
    sentence: 'A record that begins at once rings through its spectrum; how gently its ends are let rise and fall is a choice.',
  },
  {
    id: 'C53',
    title: 'Amplitude of a hybrid',
    options: [{ id: 'restricted', label: 'restricted' }, { id: 'corrected', label: 'with its first correction' }, { id: 'rescaled', label: 'rescaled to meet the numerical one' }, { id: 'join', label: 'another frequency of the join' }],
    effect: 'Against the long signal the restricted amplitude gives 4 to 8 % more SNR and the rescaled one 2 to 13 % less, for joins from 80 to 200 Hz (measured on equal masses without spin, 20 M☉ at 400 Mpc, curve G2: SNR 40.54).',
    kinds: ['rerun'],
    commonness: 'regular',
    group: 'band',
    affects: ['hybrid-snr'],
    settings: ['joinHz', 'amplitudeOrder'],
    detect: null,
    sentence: 'Below the join stands a post-Newtonian amplitude, and its order and its matching to the numerical one are choices.',
  },
];
