/** Σ q e^{2πikδ} and its first two derivatives with respect to 2πδ; whoever sums adds to it. */
export interface LagSums {
  re: number;
  im: number;
  re1: number;
  im1: number;
  re2: number;
  im2: number;
}
