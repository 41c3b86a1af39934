import type { ResultClaim, ResultDocument, ResultPoint } from '@/lib/pipeline/result';

/** Results made by hand, for rules that read a result and never compute one. */
export const point = (over: Partial<ResultPoint> = {}): ResultPoint => ({
  at: {},
  claimed: 0.9889,
  printed: '0.9889',
  tolerance: 0.00055,
  value: 0.98894,
  apart: 0.00004,
  expandedUncertainty: 2e-7,
  routes: { A: 0.98894, B: 0.9889400001 },
  verdict: 'agrees',
  ...over,
});

export const claim = (over: Partial<ResultClaim> = {}): ResultClaim => ({
  id: 'C1',
  quantity: 'match',
  unit: '',
  verdict: 'agrees',
  remarks: [],
  coverage: { state: 'unknown', missing: ['resolution'] },
  points: [point()],
  budget: [{ id: 'E01', component: 'quadrature', group: 'computation', u: 1e-7, note: 'steps halved' }],
  assumed: ['massFrame'],
  settings: [{ name: 'fLowHz', value: 20, standing: 'declared', unit: 'Hz' }],
  routeB: [0],
  findings: [],
  candidates: [],
  ...over,
});

export const result = (...claims: readonly ResultClaim[]): ResultDocument => ({
  format: 'counterfoil-result/1',
  engine: '1.0.0',
  title: 'High-precision match of two models',
  files: [{ name: 'a.txt', bytes: 4, sha256: 'a'.repeat(64) }],
  claims: claims.length > 0 ? claims : [claim()],
});

export const swept = (values: Readonly<Record<number, number>>): ResultClaim =>
  claim({
    points: Object.entries(values).map(([mass, value]) => point({ at: { totalMassMsun: Number(mass) }, value, routes: { A: value, B: value } })),
    routeB: Object.keys(values).map((_, i) => i),
  });
