import { describe } from 'vitest';
import { MPC_M, MSUN_M, MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { goldenChecks } from './golden-check';

describe('constants', () => {
  goldenChecks([
    {
      id: 'F1',
      what: 'GM☉/c³ in s',
      required: 'published',
      source: 'IAU 2015 Resolution B3, arXiv:1510.07674; c exact',
      value: 4.925490947641267e-6,
      relative: 1e-12,
      compute: () => MSUN_S,
    },
    {
      id: 'F2',
      what: 'GM☉/c² in m',
      required: 'published',
      source: 'IAU 2015 Resolution B3; c exact',
      value: 1476.6250380501249,
      relative: 1e-12,
      compute: () => MSUN_M,
    },
    {
      id: 'F3',
      what: 'one megaparsec in m',
      required: 'from memory',
      source: 'IAU 2012 B2 and 2015 B2',
      value: 3.085677581491367e22,
      relative: 1e-12,
      compute: () => MPC_M,
    },
    {
      id: 'F6',
      what: '1000 M at 60 M☉ in s',
      required: 'published',
      source: 'closed form of F1',
      value: 0.29552945685847604,
      relative: 1e-10,
      compute: () => 1000 * 60 * MSUN_S,
    },
    {
      id: 'F7',
      what: 'Mω of 250 Hz at 62 M☉',
      required: 'published',
      source: 'closed form 2πfGM/c³',
      value: 0.4796905,
      relative: 1e-6,
      compute: () => 2 * Math.PI * 250 * 62 * MSUN_S,
    },
    {
      id: 'F8',
      what: 'strain of rh/M = 0.39288 at 70 M☉, 410 Mpc',
      required: 'published',
      source: 'closed form (GM/c²D)·rh/M',
      value: 3.20995e-21,
      relative: 1e-4,
      compute: () => (0.39288 * 70 * MSUN_PER_MPC) / 410,
    },
  ]);
});
