import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { computationError, kitOf } from '@/lib/engine/budget/error-bar';
import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { PointRequest } from '@/lib/engine/conditioning/detector-settings';
import { taperWeightAt } from '@/lib/engine/conditioning/taper-window';
import type { BestTemplate } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { fittingFactorRecipe } from '@/lib/engine/quantities/detector/fitting-factor-recipe';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { bankSide, fittingFactor, makeBank, massFactors, massRange, signalMassMsun, type Bank } from './bank';
import type { GrowthPoint } from './growth';
import { growthFigure } from './growth-figure';
import type { Reference } from './reference';
import type { Row } from './report';
import { quickest, timed, type Spent } from './stopwatch';
import { band, fHighHz, fLowHz } from './sweep';

const rounds = 4;
/** The engine's run is a fraction as long: several of them meet the load that one of the script meets. */
const runsARound = 6;
const templateCounts = [10, 30, 100, 200, 400];

const plusOf = ({ content }: Waveform): Float64Array => {
  if (content.kind !== 'modes' || !content.modes[0]) throw new Error('a template has one mode');
  return content.modes[0].re;
};

/** Every record of the bank, the signal first: times from 0 and the tapered plus strain face-on, one after the other. */
function writeBank(path: string, { signal, templates }: Bank): number[] {
  const parts = [signal, ...templates].flatMap((given) => {
    const { taper, waveform } = bankSide(given);
    const plus = plusOf(waveform).map((x, i) => x * taperWeightAt(taper, waveform.axis[i]!));
    return [waveform.axis, plus];
  });
  writeFileSync(path, Buffer.concat(parts.map((x) => Buffer.from(x.buffer, x.byteOffset, x.byteLength))));
  return [signal, ...templates].map(({ axis }) => axis.length);
}

/** The fitting factor of one bank, engine and script in turn. */
export async function benchBank(reference: Reference, folder: string): Promise<Row> {
  const bank = makeBank();
  const path = join(folder, 'bank.bin');
  const lengths = writeBank(path, bank);
  const request = { do: 'bank', path, lengths, mass: signalMassMsun, factors: massFactors, fLowHz, fHighHz };
  const [ours, theirs]: [(Spent & { value: BestTemplate })[], (Spent & { best: number; index: number })[]] = [[], []];
  for (let round = 0; round < rounds; round++) {
    theirs.push(await reference.ask<Spent & { best: number; index: number }>(request));
    for (let again = 0; again < runsARound; again++) ours.push(await timed(() => fittingFactor(createRouteA(), bank)));
    console.log(`bank, round ${round + 1}: script ${theirs[round]?.cpuSeconds.toFixed(2)} s, engine ${ours.at(-1)?.cpuSeconds.toFixed(2)} s`);
  }
  const [best, script] = [quickest(ours), quickest(theirs)];
  const { index, outcome } = best.value;
  return {
    what: `fitting factor over ${bank.templates.length} templates × ${massFactors.length} masses (curve A2, ${fLowHz}–${fHighHz} Hz, records of 1 200 to 3 000 M)`,
    ours: best,
    theirs: script,
    target: '≥ 30',
    note: `engine: ${outcome.match.toFixed(6)} with template ${index}, mass refined; script: ${script.best.toFixed(6)} with template ${script.index}, grid only`,
  };
}

/** How the cost grows with the number of templates; writes the figure. */
export async function benchBankGrowth(reference: Reference, folder: string): Promise<string> {
  const points: GrowthPoint[] = [];
  const path = join(folder, 'bank.bin');
  for (const size of templateCounts) {
    const bank = makeBank(size);
    const lengths = writeBank(path, bank);
    const script = await reference.ask<Spent>({ do: 'bank', path, lengths, mass: signalMassMsun, factors: massFactors, fLowHz, fHighHz });
    const ours: Spent[] = [];
    for (let again = 0; again < runsARound; again++) ours.push(await timed(() => fittingFactor(createRouteA(), bank)));
    points.push({ size, engine: quickest(ours).cpuSeconds, script: script.cpuSeconds });
    console.log(`growth, ${size} templates: script ${script.cpuSeconds.toFixed(2)} s, engine ${points.at(-1)?.engine.toFixed(3)} s`);
  }
  growthFigure({ what: `templates, ${massFactors.length} masses each`, axis: 'templates of a bank', figure: 'bench-growth-templates.svg', points });
  return `How the cost of a fitting factor grows with the templates, at ${massFactors.length} masses each (curve A2; one run of the script, the quickest of ${runsARound} of the engine):

| templates of a bank | script, processor s | engine, processor s | ratio |
| --- | --- | --- | --- |
${points.map(({ size, engine, script }) => `| ${size} | ${script.toFixed(2)} | ${engine.toFixed(3)} | ${(script / engine).toFixed(1)} × |`).join('\n')}

![Processor seconds of script and engine by templates of a bank, both axes logarithmic](bench-growth-templates.svg)`;
}

/** What a claim pays for the uncertainty of a fitting factor, beside the search itself. */
export async function benchBankErrorBar(): Promise<string> {
  const { signal, templates } = makeBank();
  const declared = { totalMassMsun: signalMassMsun, fLowHz, fHighHz, templateMassRange: massRange };
  const { noise } = band();
  const ratios: number[] = [];
  let largest = 0;
  for (let round = 0; round < rounds; round++) {
    const store = new SpectrumStore();
    const kit = kitOf(houseNumerics, store);
    const base = await timed(() => {
      const request: PointRequest = { a: conditionWaveform(signal, 'all'), b: null, templates: templates.map((each) => conditionWaveform(each, 'all')), declared, at: {}, noise, traits: fittingFactorRecipe.traits(declared) };
      return { request, found: fittingFactorRecipe.evaluate(kit, request) };
    });
    const bar = await timed(() => computationError(fittingFactorRecipe, base.value.request, base.value.found, store).expanded);
    ratios.push(bar.cpuSeconds / base.cpuSeconds);
    largest = Math.max(largest, bar.value);
  }
  return `The error bar of the fitting factor (the same knobs, at the best template and its mass) costs **${Math.min(...ratios).toFixed(2)} ×** the search (target ≤ 5); U is ${largest.toExponential(1)}.`;
}
