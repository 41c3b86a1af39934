/** Plain LaTeX, without packages: what is special is escaped, what is no ASCII becomes mathematics. */
const escapes: Readonly<Record<string, string>> = {
  '\\': String.raw`\textbackslash{}`, '~': String.raw`\textasciitilde{}`, '^': String.raw`\textasciicircum{}`,
  '&': String.raw`\&`, '%': String.raw`\%`, $: String.raw`\$`, '#': String.raw`\#`, _: String.raw`\_`, '{': String.raw`\{`, '}': String.raw`\}`,
  '<': '$<$', '>': '$>$', '|': '$|$', '"': "''", '“': '``', '”': "''", '‘': '`', '’': "'", '–': '--', '—': '---', '…': String.raw`\ldots{}`, '\u00a0': '~',
};
const mathematics: Readonly<Record<string, string>> = {
  '−': '-', '±': String.raw`\pm`, '×': String.raw`\times`, '≤': String.raw`\le`, '≥': String.raw`\ge`, '≠': String.raw`\ne`, '≈': String.raw`\approx`, '∞': String.raw`\infty`, '·': String.raw`\cdot`, '∫': String.raw`\int`, '→': String.raw`\to`,
  '⊙': String.raw`_\odot`, '☉': String.raw`_\odot`, '°': String.raw`^\circ`, ℓ: String.raw`\ell`, '₊': '_+', '₀': '_0', '₁': '_1', '₂': '_2', '₄': '_4', 'ₘ': '_m',
  α: String.raw`\alpha`, β: String.raw`\beta`, γ: String.raw`\gamma`, ι: String.raw`\iota`, λ: String.raw`\lambda`, μ: String.raw`\mu`, π: String.raw`\pi`, ρ: String.raw`\rho`, φ: String.raw`\phi`, χ: String.raw`\chi`, ψ: String.raw`\psi`, ω: String.raw`\omega`, Δ: String.raw`\Delta`, Ω: String.raw`\Omega`, δ: String.raw`\delta`, τ: String.raw`\tau`, θ: String.raw`\theta`,
};
const raised: Readonly<Record<string, string>> = { '⁻': '-', '⁰': '0', '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁸': '8', '⁹': '9', ᐟ: '/' };
const raise = (digits: string): string => [...digits].map((digit) => Object.keys(raised).find((key) => raised[key] === digit.replace('−', '-')) ?? '').join('');
const isRaised = /[⁻⁰¹²³⁴⁵⁶⁷⁸⁹ᐟ]+/g;
const lower = (digits: string): string => `^{${[...digits].map((digit) => raised[digit] ?? '').join('')}}`;

/** Characters that end a line or steer a terminal have no place in a row. */
const oneLine = (text: string): string => text.replace(/[\u0000-\u001f\u007f\u2028\u2029]+/g, ' ');

/** Any text as a cell: LaTeX sees only characters, whatever a title or a file name holds. */
export const latexText = (text: string): string =>
  oneLine(text)
    .replace(/M[⊙☉]/g, '\u0001')
    .replace(isRaised, (digits) => `\u0002${digits}\u0002`)
    .split('\u0002')
    .map((piece, i) => (i % 2 === 1 ? `$${lower(piece)}$` : [...piece].map(character).join('')))
    .join('');

function character(c: string): string {
  if (c === '\u0001') return String.raw`$M_\odot$`;
  const sign = mathematics[c];
  return escapes[c] ?? (sign === undefined ? c : `$${sign.startsWith('_') || sign.startsWith('^') ? '{}' : ''}${sign}$`);
}

/** A printed number, with its U, power of ten and unit, in mathematics: `0.98895 \pm 0.00002`. */
export function latexNumber(printed: string): string {
  const text = oneLine(printed).replace(/(\d)[eE]([-+−]?)0*(\d+)/g, (_, digit: string, sign: string, power: string) => `${digit} × 10${raise(sign === '+' ? '' : sign)}${raise(power)}`).replace(/(\d),(?=\d{3})/g, '$1{,}').replace(/ %$/, String.raw`\,\%`);
  const digits = /^[-+−<>≤≥±×()\d.,{}\s⁻⁰¹²³⁴⁵⁶⁷⁸⁹\\%]*/.exec(text)?.[0] ?? '';
  const unit = text.slice(digits.length).trim();
  if (!/\d/.test(digits)) return latexText(printed);
  const numbers = [...digits.trim().replace(isRaised, lower)].map((c) => mathematics[c] ?? c).join('');
  const spaced = numbers.replace(/ *\\(pm|times|le|ge) */g, String.raw` \$1 `).trim();
  return `$${spaced}$${unit ? String.raw`\,` + latexText(unit) : ''}`;
}
