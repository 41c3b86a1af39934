/**
 * SHA-256 (FIPS 180-4) fed piece by piece. A browser's own digest wants all bytes at once, and half a
 * gibibyte is too much to hold; on the server the platform's is used.
 */
export class Sha256 {
  private readonly h = Uint32Array.from(INITIAL);
  private readonly block = new Uint8Array(64);
  private readonly view = new DataView(this.block.buffer);
  private filled = 0;
  private bytes = 0;

  update(chunk: Uint8Array): this {
    this.bytes += chunk.length;
    for (let at = 0; at < chunk.length; ) {
      const taken = Math.min(64 - this.filled, chunk.length - at);
      this.block.set(chunk.subarray(at, at + taken), this.filled);
      this.filled += taken;
      at += taken;
      if (this.filled === 64) this.mix();
    }
    return this;
  }

  /** Lower-case hexadecimal; after it nothing more can be added. */
  hex(): string {
    const bits = this.bytes * 8;
    const pad = new Uint8Array(((this.filled < 56 ? 56 : 120) - this.filled) + 8);
    pad[0] = 0x80;
    const length = new DataView(pad.buffer);
    length.setUint32(pad.length - 8, Math.floor(bits / 2 ** 32));
    length.setUint32(pad.length - 4, bits >>> 0);
    this.update(pad);
    return [...this.h].map((word) => word.toString(16).padStart(8, '0')).join('');
  }

  private mix(): void {
    const { h: state, view } = this;
    for (let i = 0; i < 16; i++) W[i] = view.getUint32(4 * i) | 0;
    for (let i = 16; i < 64; i++) {
      const x = W[i - 15]!;
      const y = W[i - 2]!;
      W[i] = (W[i - 16]! + (turned(x, 7) ^ turned(x, 18) ^ (x >>> 3)) + W[i - 7]! + (turned(y, 17) ^ turned(y, 19) ^ (y >>> 10))) | 0;
    }
    // Plain variables: this loop is run eight million times for a long file.
    let a = state[0]! | 0, b = state[1]! | 0, c = state[2]! | 0, d = state[3]! | 0, e = state[4]! | 0, f = state[5]! | 0, g = state[6]! | 0, h = state[7]! | 0;
    for (let i = 0; i < 64; i++) {
      const t1 = (h + (turned(e, 6) ^ turned(e, 11) ^ turned(e, 25)) + ((e & f) ^ (~e & g)) + K[i]! + W[i]!) | 0;
      const t2 = ((turned(a, 2) ^ turned(a, 13) ^ turned(a, 22)) + ((a & b) ^ (a & c) ^ (b & c))) | 0;
      h = g; g = f; f = e; e = (d + t1) | 0; d = c; c = b; b = a; a = (t1 + t2) | 0;
    }
    state[0]! += a; state[1]! += b; state[2]! += c; state[3]! += d; state[4]! += e; state[5]! += f; state[6]! += g; state[7]! += h;
    this.filled = 0;
  }
}

const W = new Int32Array(64);
const turned = (x: number, by: number): number => (x >>> by) | (x << (32 - by));

/** The first 32 bits of the fractions of a root of each of the first primes, computed exactly in whole numbers. */
function fractionsOf(power: 2n | 3n, count: number): number[] {
  const found: number[] = [];
  for (let n = 2; found.length < count; n++) {
    if (Array.from({ length: n - 2 }, (_, i) => i + 2).some((d) => n % d === 0)) continue;
    found.push(Number(rootOf(BigInt(n) << (32n * power), power) & 0xffffffffn));
  }
  return found;
}

/** The whole part of the root. */
function rootOf(n: bigint, power: 2n | 3n): bigint {
  let [low, high] = [0n, 1n << 48n];
  while (high - low > 1n) {
    const middle = (low + high) >> 1n;
    if (middle ** power <= n) low = middle;
    else high = middle;
  }
  return low;
}

const INITIAL = fractionsOf(2n, 8);
const K = Int32Array.from(fractionsOf(3n, 64));
