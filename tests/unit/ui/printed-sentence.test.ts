import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { latexRow, LATEX_COLUMNS, rowsOfSweep } from '@/app/_ui/claim/print/latex-row';
import { latexNumber, latexText } from '@/app/_ui/claim/print/latex-text';
import { printSourceOf, type PrintSource } from '@/app/_ui/claim/print/print-source';
import { printedSentence, type Printable } from '@/app/_ui/claim/print/printed-sentence';
import type { ClaimHeading } from '@/app/_ui/claim/record-view';
import { formatSetting, settingLabel } from '@/app/_ui/claim/setting-names';
import type { UsedSetting } from '@/lib/engine/contract/measurement';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable, type SettingRow } from '@/lib/engine/quantities/settings-table';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import { must, recordFixture } from './fixtures/result';

const DIGEST = '0123456789abcdef'.repeat(4);
const source: PrintSource = { kind: 'record', id: '90tf-w8a1', revision: 2, address: 'https://counterfoil.example/records/90tf-w8a1', standing: null, engine: '1.0.0', files: [{ name: 'a.txt', bytes: 1, sha256: DIGEST }, { name: 'b.txt', bytes: 1, sha256: DIGEST.replace('0123', 'ffff') }, { name: 'noise.txt', bytes: 1, sha256: DIGEST.replace('0123', 'eeee') }] };
const heading: ClaimHeading = { id: 'C1', quantity: 'match', title: 'Match of A and B', context: null, unit: '', scale: 'absolute', formula: null, methodHref: null, points: [], waveforms: [{ name: 'A', files: ['a.txt'] }, { name: 'B', files: ['b.txt'] }], noiseSource: { kind: 'built-in', id: 'G2', title: 'Second-generation ground detector, design fit', source: 'Ajith 2011, PRD 84 084037', fHighHz: 8192 } };
const point: ResultPoint = { at: {}, claimed: 0.9889, printed: '0.9889', tolerance: 0.000161, value: 0.98895333, routes: { A: 0.98895333, B: 0.98895334 }, expandedUncertainty: 0.000019, apart: 5.333e-5, verdict: 'agrees' };
const used = (name: string, value: unknown, standing: UsedSetting['standing'] = 'declared', unit?: string): UsedSetting => ({ name, value, standing, ...(unit === undefined ? {} : { unit }) });
const matchSettings = [used('totalMassMsun', 100, 'declared', 'M☉'), used('massFrame', 'detector', 'assumed'), used('fLowHz', 20, 'declared', 'Hz'), used('fHighHz', 8192, 'assumed', 'Hz'), used('maximise', ['time', 'phase']), used('inclinationRad', 0, 'assumed', 'rad'), used('response', 'plus', 'assumed'), used('modes', [[2, 2], [2, -2]]), used('taper', 'auto', 'assumed')];
const claim: ResultClaim = { id: 'C1', quantity: 'match', unit: '', verdict: 'agrees', remarks: [], coverage: { state: 'unknown' }, points: [point], budget: [], assumed: [], settings: matchSettings, routeB: [0], findings: [], candidates: [] };
const printable = (over: Partial<Printable> = {}): Printable => ({ heading, claim, point, source, ...over });
const sweepSettings = [used('totalMassMsun', { from: 60, to: 200 }, 'swept', 'M☉'), ...matchSettings.slice(1).map((s) => (s.name === 'fHighHz' ? used('fHighHz', { from: 1000, to: 3000 }, 'assumed', 'Hz') : s))];

describe('the sentence to print', () => {
  it('states value, U, curve, band, maximisation, mass, frame, modes and record, and marks what was assumed', () => {
    expect(printedSentence(printable())).toBe(
      'The match of A and B is 0.988953 ± 1.9 × 10⁻⁵ (k = 2, of the computation alone), recomputed by Counterfoil, engine 1.0.0, from the authors’ files by two routes ' +
        '(claimed: 0.9889 with tolerance 1.61 × 10⁻⁴; verdict: agrees); A from a.txt (SHA-256 0123456789ab); B from b.txt (SHA-256 ffff456789ab); ' +
        'noise curve G2, second-generation ground detector, design fit (Ajith 2011, PRD 84 084037); band from 20 Hz to 8,192 Hz (assumed: where the curve ends); ' +
        'maximised over time and phase; total mass 100 M⊙ in the detector frame (assumed); modes (2,2) (2,−2); inclination 0 rad (assumed); response plus (assumed); house taper (assumed); ' +
        'Counterfoil record 90tf-w8a1, revision 2, https://counterfoil.example/records/90tf-w8a1.',
    );
  });
  it('names a curve of the authors by its file and digest, and the band of this very point of a sweep', () => {
    const own: ResultPoint = { ...point, at: { totalMassMsun: 60 }, settings: { fHighHz: 3000 } };
    const text = printedSentence(printable({ heading: { ...heading, noiseSource: { kind: 'file', name: 'S', file: 'noise.txt' } }, claim: { ...claim, settings: sweepSettings }, point: own }));
    expect(text).toContain('The match of A and B at 60 M⊙ is 0.988953');
    expect(text).toContain('noise curve S from noise.txt (SHA-256 eeee456789ab)');
    expect(text).toContain('band from 20 Hz to 3,000 Hz (assumed: the lower of the curve’s end and the Nyquist frequency of the waveforms)');
    expect(text).toContain('total mass 60 M⊙ in the detector frame');
  });
  it('tells the ends where a run kept no band for each point, instead of choosing one', () => {
    const text = printedSentence(printable({ claim: { ...claim, settings: sweepSettings }, point: { ...point, at: { totalMassMsun: 60 } } }));
    expect(text).toContain('to between 1,000 Hz and 3,000 Hz over the points of this claim');
  });
  it('prints a distance with its unit and a fraction of the mass with what it is a fraction of', () => {
    const horizon = printable({ heading: { ...heading, title: 'Horizon distance of A', unit: 'Mpc', scale: 'ln' }, claim: { ...claim, quantity: 'horizon-distance', unit: 'Mpc', settings: [...matchSettings, used('threshold', 8, 'assumed'), used('cosmology', { h0: 67.4, omegaM: 0.315 }, 'assumed', 'h0 in km/s/Mpc'), used('average', 'sky'), used('detectors', 3), used('armAngleDeg', 60, 'declared', '°')] }, point: { ...point, printed: '3996', value: 4004.2136, expandedUncertainty: 0.3, tolerance: Math.log1p(0.05) } });
    expect(printedSentence(horizon)).toContain('The horizon distance of A is 4,004.21 ± 0.30 Mpc (k = 2');
    expect(printedSentence(horizon)).toContain('claimed: 3996 Mpc with tolerance 5.0 %');
    expect(printedSentence(horizon)).toContain('threshold 8 (assumed); flat cosmology with H₀ = 67.4 km/s/Mpc and Ωₘ = 0.315 (assumed); averaged over the sky; 3 equal detectors in one place; arm angle 60 °');
    const energy = printable({ heading: { ...heading, title: 'Radiated energy of A', noiseSource: null, waveforms: [{ name: 'A', files: ['a.txt'] }] }, claim: { ...claim, quantity: 'radiated-energy', settings: [used('modes', 'all', 'assumed'), used('startM', 150, 'declared', 'M'), used('includeEnergyBeforeStart', 'removed'), used('normaliseBy', 'M')] } });
    expect(printedSentence(energy)).toContain('; A from a.txt (SHA-256 0123456789ab); all modes of the files (assumed); integrated from t = 150 M; energy between the first sample and the start added; referred to the total mass M; ');
    expect(printedSentence(energy)).not.toMatch(/noise|band/);
  });
  it('says unknown for what is unknown, and never that a number was obtained which was not', () => {
    expect(printedSentence(printable({ point: { ...point, expandedUncertainty: null } }))).toContain('is 0.98895333 ± unknown');
    expect(printedSentence(printable({ heading: { ...heading, noiseSource: undefined, waveforms: undefined } }))).toContain('noise curve unknown here: the claim sheet names it');
    expect(printedSentence(printable({ source: { ...source, files: [] } }))).toContain('SHA-256 unknown');
    const stopped = printedSentence(printable({ claim: { ...claim, settings: [], findings: [{ code: 'formats/time-not-monotone', level: 'stops-lodging', text: 'x', where: 'A' }] }, point: { ...point, value: null, expandedUncertainty: null, verdict: 'not-computable' } }));
    expect(stopped).toContain('could not be recomputed by Counterfoil, engine 1.0.0, from the authors’ files (formats/time-not-monotone)');
    expect(stopped).toContain('settings unknown');
  });
  it('claims two routes only where two gave a number', () => {
    expect(printedSentence(printable({ point: { ...point, routes: { A: 1, B: null } } }))).toContain('by route A alone at this point');
    expect(printedSentence(printable({ point: { ...point, verdict: 'routes-disagree' } }))).toContain('by two routes, which disagree');
  });
  it('says how the record stands: struck, or not yet entered at all', () => {
    const struck = printSourceOf({ ...recordFixture, standing: 'struck', address: 'https://counterfoil.example/records/x' });
    expect(printedSentence(printable({ source: struck }))).toMatch(/Counterfoil record \S+ \(struck\), revision 2, https:\/\/counterfoil\.example\/records\/x\.$/);
    const review = printSourceOf({ ...recordFixture, mode: 'review', standing: null });
    expect(printedSentence(printable({ source: review }))).toMatch(/Counterfoil submission \S+, not yet entered, revision 2\.$/);
  });
});

const sample: Readonly<Record<SettingRow['shape']['kind'], (row: SettingRow) => fc.Arbitrary<unknown>>> = {
  number: (row) => {
    const least = Math.max(0.011, row.shape.kind === 'number' ? (row.shape.min ?? 0) : 0);
    return fc.double({ min: least, max: least + 0.9, noNaN: true });
  },
  integer: () => fc.integer({ min: 2, max: 10 }),
  choice: (row) => fc.constantFrom(...(row.shape.kind === 'choice' ? row.shape.options : [])),
  subset: (row) => fc.uniqueArray(fc.constantFrom(...(row.shape.kind === 'subset' ? row.shape.options : []))),
  interval: () => fc.tuple(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 41, max: 99 })),
  modes: () => fc.constantFrom('all', [[2, 2], [3, -3]]),
  response: () => fc.constantFrom('plus', 'cross', 'complex', { plus: 0.25, cross: 0.75 }),
  taper: () => fc.constantFrom('auto', 'none', 2),
  place: (row) => fc.constantFrom<unknown>(...(row.shape.kind === 'place' ? [...row.shape.options, ...row.shape.numbers.map(({ name }) => ({ [name]: 0.25 }))] : [])),
  cosmology: () => fc.record({ h0: fc.integer({ min: 20, max: 150 }), omegaM: fc.constant(0.3) }),
};
/** What a reader would look for, where the words are not simply label and value. */
const inWords: Readonly<Record<string, RegExp>> = { maximise: /maximised over|not maximised/, modes: /all modes|modes \(/, lMax: /ℓ ≤/, average: /average/, detectors: /detector/, response: /response/, taper: /taper/, cosmology: /cosmology with H₀/, rateLaw: /rate law/, parameters: /parameter/, includeEnergyBeforeStart: /energy (before|since|between)/, normaliseBy: /referred to/, alignment: /aligned/, at: /read (at|where|as)/, startM: /integrated from/, templateMassRange: /template mass from/, fLowHz: /band from/, fHighHz: /band from .* to /, massFrame: /in the (detector|source) frame/ };
const numbersIn = (value: unknown): readonly number[] => (typeof value === 'number' ? [value] : typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : []);

describe('every setting that a quantity takes', () => {
  const cases = [...quantities.values()].flatMap((quantity) => quantity.settings.map((name) => [quantity.id, name] as const));
  it.each(cases)('%s: %s stands in the sentence and in the row, with its value and how it came to be', (id, name) => {
    const quantity = must(quantities.get(id));
    const row = must(settingsTable.get(name));
    const others = quantity.settings.filter((other) => other !== name).map((other) => used(other, 'elsewhere'));
    fc.assert(
      fc.property(sample[row.shape.kind](row), fc.constantFrom('declared' as const, 'assumed' as const), (value, standing) => {
        const of = printable({ heading: { ...heading, noiseSource: quantity.needsNoise ? heading.noiseSource : null }, claim: { ...claim, quantity: id, settings: [...others, used(name, value, standing)] } });
        const bare = printable({ ...of, claim: { ...of.claim, settings: others } });
        const [text, without] = [printedSentence(of), printedSentence(bare)];
        expect(text).not.toBe(without);
        expect(text).toMatch(inWords[name] ?? new RegExp(settingLabel(name), 'i'));
        for (const number of numbersIn(value)) expect(text).toContain(formatSetting('', Math.abs(number)));
        expect(text.split('(assumed').length - without.split('(assumed').length).toBe(standing === 'assumed' ? 1 : 0);
        expect(latexRow(of)).not.toBe(latexRow(bare));
      }),
      { numRuns: 12 },
    );
  });
});

describe('a row of a LaTeX table', () => {
  it('has a cell for each column that the comment names', () => {
    const row = latexRow(printable());
    expect(row.split(' & ')).toHaveLength(LATEX_COLUMNS.split(' & ').length);
    expect(row).toBe(
      String.raw`C1 & Match of A and B & -- & $0.9889$ & $0.988953 \pm 1.9 \times 10^{-5}$ & G2, second-generation ground detector, design fit (Ajith 2011, PRD 84 084037) & from 20 Hz to 8,192 Hz (assumed: where the curve ends) & time and phase & total mass 100 $M_\odot$ in the detector frame (assumed) & modes (2,2) (2,$-$2) & inclination 0 rad (assumed); response plus (assumed); house taper (assumed) & agrees & Counterfoil record 90tf-w8a1, revision 2, https://counterfoil.example/records/90tf-w8a1 \\`,
    );
  });
  it('sets numbers in mathematics, with power of ten, group and unit', () => {
    expect(latexNumber('(9.75 ± 0.20) × 10⁻⁵')).toBe(String.raw`$(9.75 \pm 0.20) \times 10^{-5}$`);
    expect(latexNumber('4,004.21 ± 0.30 Mpc')).toBe(String.raw`$4{,}004.21 \pm 0.30$\,Mpc`);
    expect(latexNumber('60 M⊙')).toBe(String.raw`$60$\,$M_\odot$`);
    expect(latexNumber('4.1e-5')).toBe(String.raw`$4.1 \times 10^{-5}$`);
    expect(latexNumber('0.9984(3)')).toBe('$0.9984(3)$');
    expect(latexNumber('0.5 ± unknown')).toBe(String.raw`$0.5 \pm$\,unknown`);
  });
  it('lets no title, file name or label end the cell, the row or the line, or give a command', () => {
    expect(latexText(String.raw`50% of A_1 & B^2 {x} #3 $y$ ~\input{/etc/passwd}`)).toBe(String.raw`50\% of A\_1 \& B\textasciicircum{}2 \{x\} \#3 \$y\$ \textasciitilde{}\textbackslash{}input\{/etc/passwd\}`);
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 60 }), (name) => {
        const row = latexRow(printable({ heading: { ...heading, title: name, noiseSource: { kind: 'file', name, file: name } } }));
        expect(row).not.toMatch(/[\n\r\u2028\u2029]/);
        expect(row.replaceAll(String.raw`\textbackslash{}`, '').match(/(?<!\\)&/g)).toHaveLength(LATEX_COLUMNS.split(' & ').length - 1);
        expect(row).not.toMatch(/(?<!\\)%/);
      }),
    );
  });
  it('of a sweep is one row a point, and the parts put together again are the rows', () => {
    const rows = [60, 100, 200].map((totalMassMsun) => latexRow(printable({ claim: { ...claim, settings: sweepSettings }, point: { ...point, at: { totalMassMsun } } })));
    const { own, shared } = rowsOfSweep(rows);
    expect(own.map((row) => row + shared)).toEqual(rows);
    expect(shared.length).toBeGreaterThan(100);
  });
});
