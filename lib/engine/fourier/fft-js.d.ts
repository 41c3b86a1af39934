/** The transform library carries no types; only what we call is declared. */
declare module 'fft.js' {
  export default class FFT {
    constructor(size: number);
    readonly size: number;
    transform(out: Float64Array, data: Float64Array): void;
    /** Divides by the size. */
    inverseTransform(out: Float64Array, data: Float64Array): void;
  }
}
