import type { Convention } from './convention';
import { differences } from './affected';
import { onPair } from './measured-on';

/** What one waveform may be moved in, and how two records are laid over each other. */
export const maximisationConventions: readonly Convention[] = [
  {
    id: 'C06',
    title: 'What is maximised over',
    options: [{ id: 'none', label: 'nothing' }, { id: 'phase', label: 'phase' }, { id: 'time', label: 'time' }, { id: 'both', label: 'time and phase' }, { id: 'polarisation', label: 'polarisation too' }, { id: 'inclination', label: 'inclination too' }, { id: 'mass', label: 'the template’s mass too' }, { id: 'everything', label: 'all of these' }],
    effect: `0.033 over phase alone, 0.428 over time alone, 0.918 over both (${onPair}).`,
    kinds: ['rerun'],
    commonness: 'most',
    group: 'maximisation',
    affects: ['overlap', 'match', 'mismatch', 'fitting-factor', 'detectable-fraction', 'distinguishability-snr', 'mode-content', 'degeneracy'],
    settings: ['maximise', 'templateMassRange'],
    detect: 'A value far below one half for signals that look alike.',
    sentence: 'Overlap, match and faithfulness are used for the same and for different sets of what may be moved.',
  },
  {
    id: 'C07',
    title: 'How phase is maximised',
    options: [{ id: 'modulus', label: 'modulus of the complex product' }, { id: 'best', label: 'best of orthonormal quadratures' }, { id: 'minimax', label: 'worst of the best' }, { id: 'grid', label: 'steps on a grid' }],
    effect: '10⁻⁴ to 10⁻² in match with several m or with precession; nothing for one mode.',
    kinds: ['rerun'],
    commonness: 'regular',
    group: 'maximisation',
    affects: ['match', 'mismatch', 'distinguishability-snr', 'fitting-factor', 'detectable-fraction', 'mode-content', 'degeneracy'],
    settings: ['maximise', 'response'],
    detect: 'Modes with |m| other than 2 in the file.',
    sentence: 'For one mode all ways to turn the phase are the same; for several, phase and polarisation part.',
  },
  {
    id: 'C38',
    title: 'Steps of the search in time',
    options: [{ id: 'sample', label: 'whole samples' }, { id: 'padded', label: 'a padded transform' }, { id: 'refined', label: 'refined to the peak' }],
    effect: 'A match too low by up to (πσΔt)²/2, with σ the bandwidth as the noise weighs it.',
    kinds: ['rerun'],
    commonness: 'regular',
    group: 'maximisation',
    affects: ['match', 'mismatch', 'distinguishability-snr', 'fitting-factor', 'detectable-fraction', 'degeneracy'],
    settings: [],
    detect: 'The step of the samples.',
    sentence: 'A search that shifts by whole samples passes beside the peak and finds less.',
  },
  {
    id: 'C45',
    title: 'Alignment',
    options: [{ id: 'peak', label: 'at the peaks' }, { id: 'window', label: 'over a window' }, { id: 'frequency', label: 'where a frequency is reached' }],
    effect: 'A phase difference 2 to 10 times as large or as small.',
    kinds: ['rerun'],
    commonness: 'most',
    group: 'maximisation',
    affects: [...differences, 'em-mirroring'],
    settings: ['alignment', 'window', 'at'],
    detect: null,
    sentence: 'Where two records are made equal decides how far they part elsewhere.',
  },
];
