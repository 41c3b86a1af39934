export interface Block {
  readonly offset: readonly number[];
  readonly count: readonly number[];
}

const targetBytes = 2 ** 22;

/** A cover of the array by blocks of whole chunks, some megabytes each where the chunks allow it. */
export function blocksOf(counts: readonly number[], chunks: readonly number[] | null, size: number): { readonly blocks: () => Generator<Block>; readonly largest: number } {
  const block = counts.map((n, d) => Math.max(1, Math.min(n, n === 1 ? 1 : (chunks?.[d] ?? 1))));
  let elements = block.reduce((n, b) => n * b, 1);
  for (let d = counts.length - 1; d >= 0; d--) {
    const times = Math.max(1, Math.min(Math.ceil(counts[d]! / block[d]!), Math.floor(targetBytes / (elements * size))));
    elements = (elements / block[d]!) * Math.min(counts[d]!, block[d]! * times);
    block[d] = Math.min(counts[d]!, block[d]! * times);
  }
  return { blocks: () => cover(counts, block), largest: Math.max(1, elements) };
}

function* cover(counts: readonly number[], block: readonly number[]): Generator<Block> {
  if (counts.some((n) => n === 0)) return;
  const offset = counts.map(() => 0);
  for (;;) {
    yield { offset: [...offset], count: offset.map((o, d) => Math.min(block[d]!, counts[d]! - o)) };
    let d = counts.length - 1;
    for (; d >= 0; d--) {
      offset[d]! += block[d]!;
      if (offset[d]! < counts[d]!) break;
      offset[d] = 0;
    }
    if (d < 0) return;
  }
}
