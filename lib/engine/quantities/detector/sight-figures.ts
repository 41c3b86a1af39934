import type { PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import type { Evaluated } from './recipe';
import type { SightProblem } from './sight-problem';

const DRAWN_AZIMUTHS = 73;
const DRAWN_INCLINATIONS = 37;
const FARTHEST = Math.PI / 2;
const AZIMUTHS = 12;

const line = (label: string, role: FigureSeries['role'], values: readonly number[]): FigureSeries => ({ label, quantity: 'match 𝓜', unit: '', role, axis: 'left', scale: 'linear', values });

const evenly = (to: number, n: number): number[] => Array.from({ length: n }, (_, i) => (to * i) / (n - 1));

/**
 * The match around the azimuth of the signal, at the inclination where the value was taken.
 * Shape:  73 azimuths; none where the value is a mean over inclinations.
 * Units:  rad.
 * Error:  for the eye only.
 * Fails:  never.
 * Source: Q11.
 */
export function azimuthFigure({ matcher }: SightProblem, request: PointRequest, { sights = [] }: Evaluated): Figure[] {
  const inclinations = new Set(sights.map(({ sight }) => sight.inclinationRad));
  const [inclinationRad] = inclinations;
  if (inclinationRad === undefined || inclinations.size > 1) return [];
  const azimuths = evenly(2 * Math.PI, DRAWN_AZIMUTHS);
  const values = azimuths.map((azimuthRad) => matcher.best({ inclinationRad, azimuthRad }).match);
  return [
    {
      kind: 'curve',
      title: 'Match with the quadrupole alone, around the azimuth of the signal',
      at: request.at,
      x: { label: 'azimuth', unit: 'rad', scale: 'linear', values: azimuths },
      series: [line(`${request.a.given.name} against its (2,±2) part`, 'recomputed', values)],
    },
  ];
}

/**
 * The lowest and highest match over a's azimuth, from face-on to edge-on.
 * Shape:  37 inclinations, the extremes of 12 azimuths each.
 * Units:  rad.
 * Error:  for the eye only.
 * Fails:  never.
 * Source: Q26.
 */
export function inclinationFigure({ matcher }: SightProblem, request: PointRequest): Figure[] {
  const inclinations = evenly(FARTHEST, DRAWN_INCLINATIONS);
  const rows = inclinations.map((inclinationRad) => Array.from({ length: AZIMUTHS }, (_, i) => matcher.best({ inclinationRad, azimuthRad: (2 * Math.PI * i) / AZIMUTHS }).match));
  return [
    {
      kind: 'curve',
      title: 'Match from face-on to edge-on',
      at: request.at,
      x: { label: 'inclination', unit: 'rad', scale: 'linear', values: inclinations },
      series: [
        line('lowest over azimuth', 'recomputed', rows.map((row) => Math.min(...row))),
        line('highest over azimuth', 'noise', rows.map((row) => Math.max(...row))),
      ],
    },
  ];
}
