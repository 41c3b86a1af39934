/**
 * The noise room: published noise curves as closed forms, and uploaded tables. Both become the one
 * `NoiseCurve` of the contract, one-sided and in 1/Hz, so that nothing after this room asks how a
 * curve was given. A curve is never used outside the range on which its source states it.
 */
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import * as forms from './closed-forms';

export interface BuiltInCurve {
  readonly id: string;
  readonly title: string;
  /** Citation only. */
  readonly source: string;
  readonly fLowHz: number;
  readonly fHighHz: number;
  readonly rangeNote: string;
  /** How the coefficients reached us. */
  readonly obtained: string;
  readonly alreadyAveraged: boolean;
  /** KaTeX of S(f), for the methods pages. */
  readonly formula: string;
  readonly psd: (fHz: number) => number;
}

const noUpperEnd = 'the source states no upper end; 8192 Hz is the house bound of the ground curves';

export const builtInCurves: readonly BuiltInCurve[] = [
  {
    id: 'G2',
    title: 'Second-generation ground detector, design fit',
    source: 'Ajith 2011, PRD 84 084037 (journal reference from memory)',
    fLowHz: 10,
    fHighHz: 8192,
    rangeNote: 'house range',
    obtained: 'from public source text that quotes the paper, not from the paper itself',
    alreadyAveraged: false,
    formula: String.raw`10^{-48}\,(0.0152x^{-4}+0.2935x^{9/4}+2.7951x^{3/2}-6.5080x^{3/4}+17.7622),\ x=f/245.4\,\mathrm{Hz}`,
    psd: forms.secondGenerationDesign,
  },
  {
    id: 'G1',
    title: 'First-generation ground detector, requirement',
    source: 'requirement of the first-generation 4 km detectors, 1995 (document from memory)',
    fLowHz: 30,
    fHighHz: 8192,
    rangeNote: 'house range',
    obtained: 'coefficients read in public source text; the publication was not seen',
    alreadyAveraged: false,
    formula: String.raw`1.57271^2f^{-28}+(3.80591\times10^{-19})^2f^{-4}+(1.12277\times10^{-23})^2\,[1+(f/89.3676)^2]`,
    psd: forms.firstGenerationRequirement,
  },
  {
    id: 'G1b',
    title: 'First-generation ground detector, second site',
    source: 'Damour, Iyer & Sathyaprakash 2001, PRD 63 044023, Table IV (citation from memory)',
    fLowHz: 20,
    fHighHz: 8192,
    rangeNote: 'house range',
    obtained: 'coefficients read in public source text; the table was not seen',
    alreadyAveraged: false,
    formula: String.raw`1.02\times10^{-45}\,[(7.87x)^{-4.8}+\tfrac{6}{17x}+1+x^2],\ x=f/500\,\mathrm{Hz}`,
    psd: forms.firstGenerationSecondSite,
  },
  {
    id: 'SB',
    title: 'Space-based detector, sky-averaged instrument sensitivity',
    source: 'Robson, Cornish & Liu 2019, CQG 36 105011, arXiv:1803.01944',
    fLowHz: 1e-5,
    fHighHz: 1,
    rangeNote: 'as the source plots it',
    obtained: 'from public source text that quotes the paper; without confusion noise',
    alreadyAveraged: true,
    formula: String.raw`\tfrac{10}{3L^2}\big[P_o+\tfrac{2(1+\cos^2(f/f_*))P_a}{(2\pi f)^4}\big](1+0.6(f/f_*)^2)`,
    psd: forms.spaceBased,
  },
  {
    id: 'A1',
    title: 'First-generation ground detector, analytic fit',
    source: 'Damour, Iyer & Sathyaprakash 2001, PRD 63 044023, Table IV; Sathyaprakash & Schutz 2009, LRR 12 2, Table 1',
    fLowHz: 40,
    fHighHz: 8192,
    rangeNote: noUpperEnd,
    obtained: 'coefficients read in public source text; the review’s table from memory',
    alreadyAveraged: false,
    formula: String.raw`9\times10^{-46}\,[(4.49x)^{-56}+0.16x^{-4.52}+0.52+0.32x^2],\ x=f/150\,\mathrm{Hz}`,
    psd: forms.firstGenerationFit,
  },
  {
    id: 'A2',
    title: 'Second-generation ground detector, early analytic fit',
    source: 'Arun, Iyer, Sathyaprakash & Sundararajan 2005, PRD 71 084008; Sathyaprakash & Schutz 2009, LRR 12 2, Table 1',
    fLowHz: 20,
    fHighHz: 8192,
    rangeNote: noUpperEnd,
    obtained: 'coefficients read in public source text; the review’s table from memory',
    alreadyAveraged: false,
    formula: String.raw`10^{-49}\,\big[x^{-4.14}-5x^{-2}+111\tfrac{1-x^2+x^4/2}{1+x^2/2}\big],\ x=f/215\,\mathrm{Hz}`,
    psd: forms.secondGenerationFit,
  },
  {
    id: 'A3',
    title: 'Second-generation ground detector, third site, fit',
    source: 'Manzotti & Dietz 2012, arXiv:1202.4031, Eq. (6)',
    fLowHz: 10,
    fHighHz: 8192,
    rangeNote: noUpperEnd,
    obtained: 'equation read as quoted in public source text',
    alreadyAveraged: false,
    formula: String.raw`\big[1.259\times10^{-24}\,(0.07e^{-0.142-1.437x+0.407x^2}+3.1e^{-0.466-1.043x-0.548x^2}+0.4e^{-0.304+2.896x-0.293x^2}+0.09e^{1.466+3.722x-0.984x^2})\big]^2,\ x=\ln(f/300\,\mathrm{Hz})`,
    psd: forms.secondGenerationThirdSite,
  },
  {
    id: 'A4',
    title: 'Third-generation ground detector, fit',
    source: 'Mishra, Arun, Iyer & Sathyaprakash 2010, PRD 82 064010 (fit credited there)',
    fLowHz: 1,
    fHighHz: 8192,
    rangeNote:
      'the tabulated design starts at 1 Hz; the fit is within 20 % of its power density up to 7 kHz; the upper end is the house bound',
    obtained: 'coefficients read in public source text',
    alreadyAveraged: false,
    formula: String.raw`10^{-50}\,[2.39\times10^{-27}x^{-15.64}+0.349x^{-2.145}+1.76x^{-0.12}+0.409x^{1.10}]^2,\ x=f/100\,\mathrm{Hz}`,
    psd: forms.thirdGenerationFit,
  },
  {
    id: 'A5',
    title: 'Space-based detector, sky-averaged, without the cosine of the test-mass term',
    source: 'Robson, Cornish & Liu 2019, CQG 36 105011, arXiv:1803.01944, Eqs. (1), (9)–(11), (13)',
    fLowHz: 1e-5,
    fHighHz: 1,
    rangeNote: 'as the source plots it',
    obtained: 'constants read in the authors’ public source text; without confusion noise',
    alreadyAveraged: true,
    formula: String.raw`\tfrac{10}{3L^2}\big[P_o+\tfrac{4P_a}{(2\pi f)^4}\big](1+0.6(f/f_*)^2)`,
    psd: forms.spaceBasedSimple,
  },
];

/** A frequency a hair outside the range (relative 1e-9) counts as its end; further out there is no curve. */
export const isInside = (fHz: number, fLowHz: number, fHighHz: number): boolean =>
  fHz >= fLowHz * (1 - 1e-9) && fHz <= fHighHz * (1 + 1e-9);

/**
 * A built-in published curve by its id, as the engine's noise curve.
 * Shape:  id of `builtInCurves`; psd takes and returns a scalar.
 * Units:  Hz in, 1/Hz out, one-sided.
 * Error:  none beyond rounding: the closed form is evaluated, not tabulated.
 * Fails:  undefined for an unknown id; psd is NaN outside the stated range (fails closed).
 * Source: the curve's own `source`.
 */
export function builtInCurve(id: string): NoiseCurve | undefined {
  const found = builtInCurves.find((curve) => curve.id === id);
  if (!found) return undefined;
  const { fLowHz, fHighHz, psd } = found;
  return {
    name: `${found.id} (${found.title})`,
    builtIn: found.id,
    fLowHz,
    fHighHz,
    psd: (fHz) => (isInside(fHz, fLowHz, fHighHz) ? psd(fHz) : Number.NaN),
    points: null,
    alreadyAveraged: found.alreadyAveraged,
    source: found.source,
  };
}
