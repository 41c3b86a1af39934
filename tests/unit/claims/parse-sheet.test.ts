import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import { formatProblem } from '@/lib/kernel/problem';
import { smallCatalogue } from '../../support/small-catalogue';

type Json = Record<string, unknown>;

const good = () => ({
  format: 'counterfoil-claim/1',
  title: 'Spin is visible',
  waveforms: {
    A: { file: 'a.txt', columns: ['t', 're22', 'im22'] },
    B: { file: 'b.txt', columns: ['t', 're22', 'im22'] },
    P: { file: 'p.txt', columns: ['t', 'plus', 'cross'], timeUnit: 's', amplitudeUnit: 'strain' },
  } as Json,
  noise: { S: { file: 'noise.txt', columns: ['f', 'asd'] }, G: { curve: 'G2' } } as Json,
  claims: [match()] as Json[],
});
const match = (more: Json = {}): Json => ({ id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings: { totalMassMsun: 60 }, claimed: '0.9', ...more });

function problemsOf(sheet: unknown): string[] {
  const parsed = parseClaimSheet(sheet, smallCatalogue());
  return parsed.ok ? [] : parsed.error.map(formatProblem);
}
const withClaim = (claim: Json) => ({ ...good(), claims: [claim] });
const withWaveform = (raw: Json) => ({ ...good(), waveforms: { ...good().waveforms, X: raw } });
const withNoise = (raw: Json) => ({ ...good(), noise: { ...good().noise, X: raw } });

describe('a good sheet', () => {
  it('becomes waveforms, noise and claims with house defaults filled in', () => {
    const parsed = parseClaimSheet(new TextEncoder().encode(JSON.stringify(good())), smallCatalogue());
    if (!parsed.ok) throw new Error(parsed.error.map(formatProblem).join('\n'));
    const a = parsed.value.waveforms.get('A');
    expect(a).toMatchObject({ domain: 'time', variable: 'strain', timeUnit: 'M', amplitudeUnit: 'rh/M', polarisation: 'plus-minus-i-cross', psi4Factor: 1, negativeM: null });
    expect(parsed.value.noise.get('S')).toMatchObject({ kind: 'table', sided: 'one' });
    expect(parsed.value.claims[0]).toMatchObject({ id: 'C1', of: { a: 'A', b: 'B' }, noise: 'S', over: null, tolerance: null });
  });

  it.each<[string, Json, Json]>([
    ['a ψ₄ factor of one for strain', { psi4Factor: 1 }, { psi4Factor: 1 }],
    ['the symmetric tetrad outside φ₂', { tetrad: 'symmetric' }, { variable: 'strain' }],
    ['a mirror for φ₂, whose modes are always those given', { variable: 'phi2', negativeM: 'mirror' }, { negativeM: 'given' }],
    ['none for φ₂ as well', { variable: 'phi2', negativeM: 'none' }, { negativeM: 'given' }],
  ])('may say %s, which changes nothing', (_, words, expected) => {
    const parsed = parseClaimSheet(withWaveform({ file: 'x.txt', columns: ['t', 're22', 'im22'], ...words }), smallCatalogue());
    expect(parsed.ok && parsed.value.waveforms.get('X')).toMatchObject(expected);
  });

  it('may set one bound for a whole sweep, and a tolerance beside a bound changes nothing', () => {
    const read = parseClaimSheet(withClaim(match({ settings: {}, over: { totalMassMsun: [60, 100] }, claimed: { above: 0.9 }, tolerance: 0.1 })), smallCatalogue());
    expect(read.ok && read.value.claims[0]?.claimed).toEqual([{ kind: 'above', bound: 0.9, printed: expect.any(String) }, { kind: 'above', bound: 0.9, printed: expect.any(String) }]);
  });

  it('may sweep one setting, with a claimed entry for each value', () => {
    const sweep = match({ settings: {}, over: { totalMassMsun: [60, 100] }, claimed: ['0.9', { above: 0.8 }] });
    expect(problemsOf(withClaim(sweep))).toEqual([]);
  });

  it.each([
    ['two digits of m behind a comma', ['t', 're10,-10', 'im10,-10']],
    ['amplitudes of several modes', ['t', 'amp22', 'phase22', 'amplitude2-2', 'phase2-2']],
    ['skipped columns', ['t', '_', 're', '_', 'im']],
  ])('may name %s', (_, columns) => {
    expect(problemsOf(withWaveform({ file: 'x.txt', columns }))).toEqual([]);
  });
});

describe('a bad sheet is refused with every problem, its place, what was seen and what was expected', () => {
  it('from all its parts at once', () => {
    const bad = {
      ...good(),
      formt: 1,
      waveforms: { A: { file: '../a.txt', columns: ['t', 're22', 'im22'] }, B: { file: 'b.txt', colums: ['t'] } },
      noise: { S: { file: 'noise.txt', columns: ['f', 'asd', 'psd'] } },
      claims: [match({ settings: { totalMassMsun: -1, flowHz: 20 }, claimed: '0,9' }), match({ quantity: 'mach' })],
    };
    expect(problemsOf(bad).map((line) => line.split(':')[0])).toEqual([
      '/formt', '/waveforms/A/file', '/waveforms/B/colums', '/noise/S/columns', '/claims/0/settings/totalMassMsun', '/claims/0/settings/flowHz', '/claims/0/claimed', '/claims/1/quantity', '/claims/1/id',
    ]);
  });

  const rows: [string, unknown, string][] = [
    ['another format', { ...good(), format: 'counterfoil-claim/2' }, '/format: saw "counterfoil-claim/2"; expected "counterfoil-claim/1".'],
    ['no claims', { ...good(), claims: [] }, '/claims: saw []; expected at least one claim.'],
    ['a misspelt name', { ...good(), titel: 'x' }, '/titel: saw the unknown name "titel"; expected one of format, title, statement, waveforms, noise, claims. Did you mean "title"?'],
    ['something else than an object', [1], 'saw [1]; expected a claim sheet'],
    ['a misspelt quantity', withClaim(match({ quantity: 'missmatch' })), '/claims/0/quantity: saw the unknown quantity "missmatch"'],
    ['a misspelt setting', withClaim(match({ settings: { totalMassMsun: 60, fLowHertz: 20 } })), '/claims/0/settings/fLowHertz: saw the unknown name "fLowHertz"'],
    ['a setting in other letters', withClaim(match({ settings: { totalmassmsun: 60 } })), 'Did you mean "totalMassMsun"?'],
    ['a setting of another quantity', withClaim(match({ settings: { totalMassMsun: 60, detectors: 2 } })), '/claims/0/settings/detectors: saw the setting "detectors"; expected a setting of match: '],
    ['a maximised overlap', withClaim(match({ quantity: 'overlap', settings: { totalMassMsun: 60, maximise: ['time'] } })), 'An overlap is not maximised; the quantity "match" is.'],
    ['a mass as a string', withClaim(match({ settings: { totalMassMsun: '60' } })), '/claims/0/settings/totalMassMsun: saw "60"; expected a number from 0.1 to 10000000000 M☉.'],
    ['a mass out of range', withClaim(match({ settings: { totalMassMsun: 0.01 } })), '/claims/0/settings/totalMassMsun: saw 0.01; expected a number from 0.1'],
    ['an inclination above π', withClaim(match({ settings: { totalMassMsun: 60, inclinationRad: 90 } })), 'saw 90; expected a number from 0 to π rad.'],
    ['a fractional lMax', withClaim(match({ settings: { totalMassMsun: 60, lMax: 2.5 } })), 'saw 2.5; expected a whole number from 2 to 12.'],
    ['a band upside down', withClaim(match({ settings: { totalMassMsun: 60, fLowHz: 300, fHighHz: 30 } })), '/claims/0/settings/fHighHz: saw an upper edge of 30 Hz with a lower edge of 300 Hz; expected fHighHz above fLowHz.'],
    ['a swept band upside down', withClaim(match({ settings: { totalMassMsun: 60, fHighHz: 100 }, over: { fLowHz: [20, 200] }, claimed: [1, 1] })), '/claims/0/over/fLowHz/1: saw an upper edge of 100 Hz'],
    ['an unknown response', withClaim(match({ settings: { totalMassMsun: 60, response: 'both' } })), 'expected "plus", "cross", "complex" or {"plus": number, "cross": number}.'],
    ['a mode that does not exist', withClaim(match({ settings: { totalMassMsun: 60, modes: [[2, 3]] } })), '/claims/0/settings/modes'],
    ['a mode listed twice', withClaim(match({ settings: { totalMassMsun: 60, modes: [[2, 2], [2, 2]] } })), '/claims/0/settings/modes'],
    ['a missing mass', withClaim(match({ settings: {} })), '/claims/0/settings/totalMassMsun: saw nothing; expected the setting "totalMassMsun": match has no default for it with these waveforms.'],
    ['a missing distance', withClaim(match({ quantity: 'snr', of: { a: 'A' } })), '/claims/0/settings/distanceMpc: saw nothing'],
    ['a missing noise curve', withClaim(match({ noise: undefined })), '/claims/0/noise: saw nothing; expected a noise curve of this sheet (S, G).'],
    ['an unknown noise curve', withClaim(match({ noise: 'SS' })), '/claims/0/noise: saw "SS"; expected a noise curve of this sheet (S, G). Did you mean "S"?'],
    ['noise where none is used', withClaim({ id: 'C1', quantity: 'radiated-energy', of: { a: 'A' }, noise: 'S', claimed: 1 }), '/claims/0/noise: saw "S"; expected no noise curve for radiated-energy.'],
    ['an unknown waveform', withClaim(match({ of: { a: 'A', b: 'C' } })), '/claims/0/of/b: saw "C"; expected a waveform of this sheet (A, B, P).'],
    ['a missing role', withClaim(match({ of: { a: 'A' } })), '/claims/0/of/b: saw nothing; expected a waveform of this sheet as "b" of match.'],
    ['a role too many', withClaim(match({ quantity: 'snr', settings: { totalMassMsun: 60, distanceMpc: 100 } })), '/claims/0/of/b: saw the role "b"; expected only "a" for snr.'],
    ['two swept settings', withClaim(match({ settings: {}, over: { totalMassMsun: [60], fLowHz: [20] }, claimed: [1] })), '/claims/0/over: saw the settings totalMassMsun, fLowHz; expected exactly one swept setting.'],
    ['a setting that cannot be swept', withClaim(match({ over: { taper: [1, 2] }, claimed: [1, 1] })), '/claims/0/over/taper: saw a sweep over "taper"; expected a sweep over one of'],
    ['a setting both swept and declared', withClaim(match({ over: { totalMassMsun: [60] }, claimed: [1] })), 'saw "totalMassMsun" both in "settings" and in "over"'],
    ['a swept value out of range', withClaim(match({ settings: {}, over: { totalMassMsun: [60, 0] }, claimed: [1, 1] })), '/claims/0/over/totalMassMsun/1: saw 0'],
    ['fewer claimed entries than points', withClaim(match({ settings: {}, over: { totalMassMsun: [60, 100] }, claimed: ['0.9'] })), '/claims/0/claimed: saw 1 claimed entry; expected 2, one for each value of "over".'],
    ['one claimed entry for a sweep', withClaim(match({ settings: {}, over: { totalMassMsun: [60, 100] }, claimed: '0.9' })), 'a list with one entry for each value of "over", or one inequality for them all'],
    ['a list where nothing is swept', withClaim(match({ claimed: [0.9] })), 'expected one entry, as nothing is swept. Name the swept setting in "over".'],
    ['no claimed value', withClaim({ ...match(), claimed: undefined }), '/claims/0/claimed: saw nothing; expected the claimed value.'],
    ['a tolerance below zero', withClaim(match({ tolerance: -0.1 })), '/claims/0/tolerance: saw -0.1; expected a tolerance of zero or more.'],
    ['an id used twice', { ...good(), claims: [match(), match()] }, '/claims/1/id: saw "C1", as in claim 0; expected an id of its own for each claim.'],
    ['an angle for columns that are projected already', withClaim(match({ quantity: 'snr', of: { a: 'P' }, settings: { inclinationRad: 0.1 } })), '/claims/0/settings/inclinationRad: saw "inclinationRad" for "P"; expected no angle for strain along one line of sight'],
    ['a swept angle for such columns', withClaim(match({ quantity: 'snr', of: { a: 'P' }, settings: {}, over: { inclinationRad: [0.1] }, claimed: [1] })), '/claims/0/over/inclinationRad: saw "inclinationRad" for "P"'],
    ['a mass for physical strain without one', withClaim(match({ quantity: 'snr', of: { a: 'P' }, settings: { totalMassMsun: 60 } })), '/claims/0/settings/totalMassMsun: saw "totalMassMsun" for the physical strain "P", which states no totalMassMsun and no distanceMpc of its own'],
    ['a distance for physical strain without one', withClaim(match({ quantity: 'snr', of: { a: 'P' }, settings: { distanceMpc: 60 } })), '/claims/0/settings/distanceMpc: saw "distanceMpc" for the physical strain "P"'],
    ['no file', withWaveform({ columns: ['t', 're', 'im'] }), '/waveforms/X/file: saw nothing; expected "file", or "files" for one file a mode.'],
    ['file and files', withWaveform({ file: 'a.txt', files: { '2,2': 'b.txt' }, columns: ['t', 're', 'im'] }), '/waveforms/X/files'],
    ['no columns', withWaveform({ file: 'x.txt' }), '/waveforms/X/columns: saw nothing; expected the columns of the text file'],
    ['an unknown column', withWaveform({ file: 'x.txt', columns: ['time', 're', 'im'] }), '/waveforms/X/columns/0: saw the unknown column "time"'],
    ['a frequency axis for a series in time', withWaveform({ file: 'x.txt', columns: ['f', 're', 'im'] }), '/waveforms/X/columns/0: saw the unknown column "f"'],
    ['real parts without imaginary ones', withWaveform({ file: 'x.txt', columns: ['t', 're22', 'im21'] }), '"re" with "im", or "amplitude" with "phase" for the mode 2,2'],
    ['a mode declared twice', withWaveform({ file: 'x.txt', columns: ['t', 're22', 'im22', 'amp22', 'phase22'] }), 'expected each mode once; 2,2 is declared twice.'],
    ['cross without plus', withWaveform({ file: 'x.txt', columns: ['t', 'cross'] }), 'expected "plus" beside "cross".'],
    ['modes beside polarisations', withWaveform({ file: 'x.txt', columns: ['t', 'plus', 'cross', 're22', 'im22'] }), 'expected either plus and cross, or modes, not both.'],
    ['a mode that has no harmonic', withWaveform({ file: 'x.txt', columns: ['t', 're23', 'im23'] }), 'saw the mode l = 2, m = 3 in "re23"; expected l from 2 to 40 and |m| ≤ l.'],
    ['a mode named twice in files', withWaveform({ files: { '2,2': 'a.txt', '2, 2': 'b.txt' }, columns: ['t', 're', 'im'] }), 'saw the mode 2,2 twice; expected each mode once.'],
    ['files whose columns name modes', withWaveform({ files: { '2,2': 'a2.txt' }, columns: ['t', 're22', 'im22'] }), 'without a mode, as "files" name it'],
    ['seconds with rh/M', withWaveform({ file: 'x.txt', columns: ['t', 're', 'im'], timeUnit: 's' }), '/waveforms/X/amplitudeUnit'],
    ['hertz in the time domain', withWaveform({ file: 'x.txt', columns: ['t', 're', 'im'], timeUnit: 'Hz' }), '/waveforms/X/timeUnit: saw "Hz"; expected "M" or "s" for domain "time".'],
    ['a ψ₄ factor for strain', withWaveform({ file: 'x.txt', columns: ['t', 're', 'im'], psi4Factor: 2 }), '/waveforms/X/psi4Factor: saw 2; expected it only beside variable "psi4".'],
    ['another tetrad for strain', withWaveform({ file: 'x.txt', columns: ['t', 're', 'im'], tetrad: 'kinnersley' }), '/waveforms/X/tetrad: saw "kinnersley"; expected it only beside variable "phi2".'],
    ['an HDF5 file without datasets', withWaveform({ file: 'x.h5', columns: ['t', 're', 'im'] }), '/waveforms/X/datasets: saw nothing; expected the datasets of the file, such as {"2,2": "/l2_m2"}'],
    ['a variable that the quantity has no meaning for', { ...withWaveform({ file: 'x.txt', variable: 'phi2', columns: ['t', 're11', 'im11'] }), claims: [match({ of: { a: 'A', b: 'X' } })] }, '/claims/0/of/b: saw "X", which holds phi2; expected strain, news, psi4 as "b" of match.'],
    ['a gravitational unit for φ₂', withWaveform({ file: 'x.txt', variable: 'phi2', columns: ['t', 're', 'im'], amplitudeUnit: 'rh/M' }), '/waveforms/X/amplitudeUnit: saw "rh/M"; expected "geometric" or "perField" for φ₂.'],
    ['a luminosity with another column', withWaveform({ file: 'x.txt', variable: 'luminosity', columns: ['t', 'L', 're'] }), '"t" and "L" once each, the luminosity in erg/s'],
    ['a luminosity column beside strain', withWaveform({ file: 'x.txt', columns: ['t', 'L'] }), '"L" only beside variable "luminosity"'],
    ['an absolute path', withWaveform({ file: '/etc/passwd', columns: ['t', 're', 'im'] }), '/waveforms/X/file: saw the absolute path "/etc/passwd"; expected a relative path inside the sheet’s folder'],
    ['a drive letter', withWaveform({ file: 'C:x.txt', columns: ['t', 're', 'im'] }), 'saw the absolute path "C:x.txt"'],
    ['a path that climbs', withWaveform({ file: 'a/../../x', columns: ['t', 're', 'im'] }), 'which climbs out of the folder'],
    ['a backslash', withWaveform({ file: 'a\\x.txt', columns: ['t', 're', 'im'] }), 'with a backslash'],
    ['a zero byte', withWaveform({ file: 'a\u0000.txt', columns: ['t', 're', 'im'] }), 'a path with control characters'],
    ['an empty part', withWaveform({ file: 'a//x.txt', columns: ['t', 're', 'im'] }), 'with an empty or "." part'],
    ['names that differ in case only', withWaveform({ file: 'A.txt', columns: ['t', 're', 'im'] }), 'saw "A.txt" beside "a.txt", the same but for letter case'],
    ['an unknown built-in curve', withNoise({ curve: 'G3' }), '/noise/X/curve: saw the unknown curve "G3"; expected one of G2, G1, SB. Did you mean "G2"?'],
    ['a built-in curve with columns', withNoise({ curve: 'G2', columns: ['f', 'asd'] }), 'expected no "columns" for a built-in curve'],
    ['neither file nor curve', withNoise({}), '/noise/X: saw neither "file" nor "curve"'],
    ['a noise table without frequencies', withNoise({ file: 'n2.txt', columns: ['asd', '_'] }), 'expected the column "f" once.'],
    ['a name of the prototype', { ...good(), waveforms: JSON.parse('{"__proto__": {"file": "a.txt"}}') as Json }, ' saw the name "__proto__"'],
  ];
  it.each(rows)('for %s', (_, sheet, sentence) => {
    expect(problemsOf(sheet).join('\n')).toContain(sentence);
  });

  it('without a second complaint about a part that others only name', () => {
    const broken = withWaveform({ file: 'x.txt' });
    broken.claims = [match({ of: { a: 'X', b: 'B' } })];
    expect(problemsOf(broken)).toHaveLength(1);
  });
});

describe('the text of a sheet', () => {
  const problemsOfText = (text: string | Uint8Array) => problemsOf(typeof text === 'string' ? new TextEncoder().encode(text) : text);

  it('that is not JSON is refused with its line', () => {
    expect(problemsOfText('{\n  "format": 1,,\n}')[0]).toContain('saw text that is not JSON at line 2, column 15; expected JSON text.');
  });

  it('that is not UTF-8 is refused', () => {
    expect(problemsOfText(Uint8Array.of(0x7b, 0xff, 0x7d))[0]).toContain('saw bytes that are not UTF-8');
  });

  it('with a name twice in one object is refused: only one would count', () => {
    const text = JSON.stringify(good()).replace('"totalMassMsun":60', '"totalMassMsun":60,"totalMass\\u004dsun":100');
    expect(problemsOfText(text)).toEqual(['/claims/0/settings/totalMassMsun: saw the name "totalMassMsun" twice in one object; expected each name once. Remove one of the two; a reader would see only the last.']);
  });

  it('with a number beyond doubles is refused', () => {
    const text = JSON.stringify(good()).replace('"totalMassMsun":60', '"totalMassMsun":1e999');
    expect(problemsOfText(text)[0]).toContain('/claims/0/settings/totalMassMsun: saw a number outside the range of double precision');
  });

  it('nested without end is refused, not crashed on', () => {
    expect(problemsOfText('['.repeat(200_000) + ']'.repeat(200_000)).length).toBeGreaterThan(0);
  });

  it('of any shape ends in claims or in problems', () => {
    const value = fc.jsonValue({ maxDepth: 4 });
    const near = fc.record({ format: fc.constant('counterfoil-claim/1'), waveforms: fc.dictionary(fc.string(), value), noise: fc.dictionary(fc.string(), value), claims: fc.array(fc.oneof(value, fc.record({ id: value, quantity: fc.constantFrom('match', 'snr'), of: fc.dictionary(fc.string(), value), settings: value, over: value, claimed: value }))) });
    fc.assert(fc.property(fc.oneof(value, near), (raw) => {
      const parsed = parseClaimSheet(raw, smallCatalogue());
      expect(parsed.ok || parsed.error.length > 0).toBe(true);
    }), { seed: 8, numRuns: 3000 });
  });
});

describe('one entry that is off hides no fault of the others', () => {
  it('in a claim', () => {
    const told = problemsOf(withClaim({ id: 'C1', quantity: 'match', of: { a: 'A', b: 'nobody' }, noise: 'S', settings: { totalMassMsun: -5, fLowHertz: 20 }, claimed: 'much', tolerance: -1, colour: 'red' }));
    const places = ['/claims/0/claimed', '/claims/0/colour', '/claims/0/of/b', '/claims/0/settings/fLowHertz', '/claims/0/settings/totalMassMsun', '/claims/0/tolerance'];
    expect(told.map((line) => line.split(':')[0]).sort()).toEqual(places);
  });

  it('in a claim whose quantity nobody knows', () => {
    expect(problemsOf(withClaim(match({ quantity: 'matsch', claimed: 'much' }))).map((line) => line.split(':')[0])).toEqual(['/claims/0/quantity', '/claims/0/claimed']);
  });

  it('in a waveform', () => {
    const told = problemsOf(withWaveform({ file: '../a.txt', columns: ['t', 're22', 'foo'], psi4Factor: 3, timeUnit: 's' }));
    expect(told.map((line) => line.split(':')[0]).sort()).toEqual(['/waveforms/X/amplitudeUnit', '/waveforms/X/columns/2', '/waveforms/X/file', '/waveforms/X/psi4Factor']);
  });

  it('and what was refused is not called missing as well', () => {
    expect(problemsOf(withWaveform({ file: 7, columns: ['t', 're22', 'im22'] })).map((line) => line.split(' saw')[0])).toEqual(['/waveforms/X/file:']);
  });

  it('a claim without a number is told so in words of the format', () => {
    const { claimed: _, ...bare } = match();
    expect(problemsOf(withClaim(bare))).toEqual(['/claims/0/claimed: saw nothing; expected the claimed value.']);
  });
});
