import type { Finding } from '@/lib/engine/contract/finding';
import type { ComposerFields } from './fields';

/** A step that a finding names and that the form can take by itself. */
export interface Fix {
  readonly words: string;
  readonly field: string;
  readonly value: string;
}

const bandStep = /\b(?:Set|Raise|Lower) (fLowHz|fHighHz) to ([\d.]+(?:e[+-]?\d+)?) ?Hz/i;
const negativeM = /\bnegativeM\b/;
const burstEnd = /junkEndM.*after t = (−?[\d.]+) M/;
const onlyQuadrupole = /\bdeclare lMax: 2\b/;

/** The buttons beneath a finding; none where the step is outside the form (another file, another number). */
export function fixesOf(finding: Pick<Finding, 'where' | 'fix'>, claimId: string, fields: Pick<ComposerFields, 'claims' | 'waveforms'>): readonly Fix[] {
  const { fix } = finding;
  const claim = fields.claims.findIndex((c) => c.id === claimId);
  if (!fix || claim < 0) return [];
  const of = fields.claims[claim];
  const setting = (name: string, value: string, words = `Set ${name} to ${value}`): Fix => ({ words: `${words}, for ${claimId}`, field: `claims.${claim}.settings.${name}`, value });
  const waveform = fields.waveforms.findIndex((w) => mentions(finding.where, w.name) && (w.name === of?.a || w.name === of?.b));
  const band = bandStep.exec(fix);
  if (band?.[1] && band[2] && of?.overSetting !== band[1]) return [setting(band[1], band[2], `Set ${band[1]} to ${band[2]} Hz`)];
  if (negativeM.test(fix) && waveform >= 0) return ['mirror', 'given', 'none'].map((value) => ({ words: `Modes with m < 0 of ${fields.waveforms[waveform]?.name}: ${value}`, field: `waveforms.${waveform}.negativeM`, value }));
  const burst = burstEnd.exec(fix)?.[1];
  if (burst && waveform >= 0) return [{ words: `End the start-up burst of ${fields.waveforms[waveform]?.name} at ${burst} M`, field: `waveforms.${waveform}.junkEndM`, value: burst.replace('−', '-') }];
  return onlyQuadrupole.test(fix) ? [setting('lMax', '2', 'Say that ℓ = 2 is meant')] : [];
}

const mentions = (where: string, name: string): boolean => where.split(/[\s,;:()]+|\band\b/).includes(name);
