import type { Finding } from '@/lib/engine/contract/finding';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';

/** V22 and V23: facts about the binary that contradict each other or physics. The level says whether a number is still worth computing. */
export function sheetFindings(w: Pick<WaveformDeclaration, 'name' | 'binary'>): Finding[] {
  return [...spinFindings(w.name, w.binary), ...massFindings(w.name, w.binary)];
}

/** V22 for a mass ratio that the claim itself declares, whatever quantity takes it. */
export function claimFindings({ id, settings }: { readonly id: string; readonly settings: Pick<DeclaredSettings, 'massRatio'> }): Finding[] {
  const { massRatio: q } = settings;
  if (q === undefined || q >= 1) return [];
  const turned = Number((1 / q).toPrecision(6));
  const text = `massRatio is ${q}; the house order is heavier over lighter, q ≥ 1. The number was computed with chi1z on the lighter body.`;
  return [{ code: 'claims/mass-sums', level: 'needs-answer', where: id, text, fix: `Give ${turned} and exchange chi1z and chi2z, or exchange nothing if the spins already stand in that order.` }];
}

function spinFindings(where: string, binary: BinaryFacts): Finding[] {
  const spins = [['chi1z', binary.chi1z], ['chi2z', binary.chi2z], ['remnantSpin', binary.remnantSpin]] as const;
  return spins.flatMap(([name, spin]) =>
    spin === undefined || Math.abs(spin) <= 1
      ? []
      : [{ code: 'claims/spin-above-one', level: 'stops-lodging' as const, where, text: `${name} is ${spin}. A dimensionless spin lies between −1 and 1.`, fix: 'Check whether S/m was given instead of S/m².' }],
  );
}

function massFindings(where: string, binary: BinaryFacts): Finding[] {
  const { massRatio, admEnergy, remnantMass } = binary;
  const found: Finding[] = [];
  const ask = (text: string, fix: string) => found.push({ code: 'claims/mass-sums', level: 'needs-answer', where, text, fix });
  if (massRatio !== undefined && massRatio < 1) ask(`massRatio is ${massRatio}; the house order is heavier over lighter, q ≥ 1.`, `If the bodies are labelled the other way round, give ${Number((1 / massRatio).toPrecision(6))} and exchange chi1z and chi2z.`);
  if (admEnergy !== undefined && Math.abs(admEnergy - 1) > 0.1) ask(`admEnergy is ${admEnergy} in units of the total mass; it should lie just below 1.`, 'Check whether it is given in units of the total mass M.');
  if (remnantMass !== undefined && remnantMass > (admEnergy ?? 1) + 1e-9) ask(`remnantMass is ${remnantMass}, more than the ${admEnergy === undefined ? 'total mass, 1' : `initial energy, ${admEnergy}`}.`, 'Check whether the masses are given in units of the initial total mass.');
  return found;
}
