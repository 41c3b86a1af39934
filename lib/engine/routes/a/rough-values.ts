/** Every so-manieth factor is looked at first; three steps of 2 % are well inside most hills. */
const STRIDE = 3;
/** Fewer factors than this are all looked at. */
const FEW = 8;
/** Of the best value, what rough values may be low by. */
const ROUGH = 0.01;

/**
 * Rough matches by signal, template and factor. Factors between those that are looked at first only matter where the values
 * beside them, raised by the largest step between neighbours, reach the best value: a hill of constant bend rises by a
 * quarter of that. What is not looked at lies on the line between its neighbours.
 */
export class RoughValues {
  readonly values: Float32Array;

  constructor(
    private readonly signals: number,
    private readonly templates: number,
    private readonly factors: number,
  ) {
    this.values = new Float32Array(signals * templates * factors);
  }

  private at(s: number, t: number, g: number): number {
    return (s * this.templates + t) * this.factors + g;
  }

  set(s: number, t: number, g: number, value: number): void {
    this.values[this.at(s, t, g)] = value;
  }

  isFirst(g: number): boolean {
    return this.factors < FEW || g % STRIDE === 0 || g === this.factors - 1;
  }

  /** After the first look: which of the others matter. Those that do not are filled in. */
  intervals(): { readonly matters: (s: number, t: number, g: number) => boolean } {
    const { values, factors } = this;
    const chosen = new Uint8Array(values.length);
    const firsts = Array.from({ length: factors }, (_, g) => g).filter((g) => this.isFirst(g));
    for (let s = 0; s < this.signals; s++) {
      let best = 0;
      for (let t = 0; t < this.templates; t++) for (const g of firsts) best = Math.max(best, values[this.at(s, t, g)]!);
      for (let t = 0; t < this.templates; t++) this.chooseFor(s, t, firsts, best, chosen);
    }
    return { matters: (s, t, g) => chosen[this.at(s, t, g)] === 1 };
  }

  private chooseFor(s: number, t: number, firsts: readonly number[], best: number, chosen: Uint8Array): void {
    const { values } = this;
    const value = (i: number): number => values[this.at(s, t, firsts[Math.max(0, Math.min(firsts.length - 1, i))]!)]!;
    for (let i = 1; i < firsts.length; i++) {
      const [low, high] = [value(i - 1), value(i)];
      const step = Math.max(Math.abs(high - low), Math.abs(low - value(i - 2)), Math.abs(value(i + 1) - high));
      const matters = Math.max(low, high) + step >= best * (1 - ROUGH);
      const [from, to] = [firsts[i - 1]!, firsts[i]!];
      for (let g = from + 1; g < to; g++) {
        if (matters) chosen[this.at(s, t, g)] = 1;
        else values[this.at(s, t, g)] = low + ((high - low) * (g - from)) / (to - from);
      }
    }
  }
}
