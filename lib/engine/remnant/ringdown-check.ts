import type { PreparedPoint } from '../radiation/prepare-radiated';
import { lineByRouteA, ringdownPreparer } from '../ringdown/ringdown-point';
import { isFinding } from '../tones/measure-tones';
import type { Balance } from './balance-recipe';
import { kerrFromTone } from './ringdown-inversion';

/**
 * What the ringing of (2,2) says of the number that a balance gives: other physics, so a check and no route.
 * Shape:  a function of the point, remembering what it read; null where there is no ringdown to read.
 * Units:  mass in M, spin dimensionless.
 * Error:  that of the fit and of the table, some tenths of a per cent.
 * Fails:  null.
 * Source: settings.md rule 11 and section 5; Q18.
 */
export function ringdownCheck({ request, which }: Pick<Balance, 'request' | 'which'>): (point: Pick<PreparedPoint, 'settings'>) => number | null {
  const { window, integrationFloor } = request.settings;
  const settings = { ...(window === undefined ? {} : { window }), ...(integrationFloor === undefined ? {} : { integrationFloor }) };
  const prepare = ringdownPreparer({ ...request, settings });
  const known = new Map<string, number | null>();
  return ({ settings: { startM, floor } }) => {
    const key = floor === null ? '' : `${startM} ${floor}`;
    const found = known.get(key);
    if (found !== undefined) return found;
    const point = prepare(floor === null ? {} : { startM, integrationFloor: floor });
    const line = isFinding(point) ? point : lineByRouteA(point);
    const kerr = isFinding(line) ? null : kerrFromTone('22', line.line, 'A');
    const value = kerr === null ? null : kerr[which];
    known.set(key, value);
    return value;
  };
}
