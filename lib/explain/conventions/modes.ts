import type { Convention } from './convention';
import { fluxes, limits, remnants } from './affected';
import { onEnergy, onRecoil } from './measured-on';

/** Which modes are there, which are used, and what their labels mean. */
export const modeConventions: readonly Convention[] = [
  {
    id: 'C23',
    title: 'Sense of the label m',
    options: [{ id: 'm', label: 'm along the orbital axis' }, { id: 'minus-m', label: '−m' }],
    effect: `Relabelled without (−1)^ℓ the recoil is 127.1 km/s and points elsewhere (${onRecoil}).`,
    kinds: ['exchange'],
    commonness: 'regular',
    group: 'modes',
    affects: ['radiated-angular-momentum', 'recoil', 'mode-content', 'degeneracy'],
    settings: [],
    detect: 'How each mode of −m correlates with (−1)^ℓ times the conjugate of its partner.',
    sentence: 'Exchanging m and −m is a rotation only together with a sign that depends on ℓ.',
  },
  {
    id: 'C24',
    title: 'Modes of negative m',
    options: [{ id: 'mirror', label: '(−1)^ℓ times the conjugate' }, { id: 'no-sign', label: 'the conjugate without its sign' }, { id: 'absent', label: 'left out' }],
    effect: `Without (−1)^ℓ the part of the recoil in the orbital plane is 50.5 km/s, and a part of 103 km/s along the axis appears that symmetry forbids. With the modes left out the part in the plane is half, 70.9 km/s, the energy half as well, and thousands of km/s point along the axis (${onRecoil}).`,
    kinds: ['factor', 'rerun'],
    commonness: 'regular',
    group: 'modes',
    affects: [...fluxes, ...remnants, 'mode-content', 'degeneracy'],
    settings: [],
    detect: 'The list of modes.',
    sentence: 'Files that hold one sign of m expect the reader to make the other, and energies alone do not show a wrong sign.',
  },
  {
    id: 'C25',
    title: 'Which modes are summed',
    options: [{ id: 'quadrupole', label: '(2,±2) alone' }, { id: 'l2', label: 'ℓ = 2' }, { id: 'l4', label: 'ℓ ≤ 4' }, { id: 'l6', label: 'ℓ ≤ 6' }, { id: 'l8', label: 'ℓ ≤ 8' }],
    effect: `With (2,±2) alone the energy is 1.6 % lower (${onEnergy}), 7 % for mass ratio 2; a recoil from ℓ = 2 alone is 44.4 km/s (${onRecoil}).`,
    kinds: ['rerun'],
    commonness: 'most',
    group: 'modes',
    affects: [...fluxes, ...remnants, 'mode-content', 'degeneracy', 'convergence-order', ...limits],
    settings: ['modes', 'lMax'],
    detect: 'The list of modes.',
    sentence: 'A sum over modes ends somewhere, and a recoil lives from products of neighbours.',
  },
  {
    id: 'C26',
    title: 'Phase of the harmonics',
    options: [{ id: 'plain', label: 'with the sign of the house' }, { id: 'other-sign', label: 'with another sign for odd m' }, { id: 'azimuth', label: 'another origin of the azimuth' }],
    effect: 'Signals seen at an inclination, and recoils.',
    kinds: ['exchange'],
    commonness: 'regular',
    group: 'modes',
    affects: ['mode-content', 'degeneracy', 'recoil'],
    settings: ['azimuthRad'],
    detect: 'Signs of the modes of odd m against their post-Newtonian phases.',
    sentence: 'Harmonics carry a sign for odd m in some texts, and an azimuth starts where somebody put it.',
  },
];
