/**
 * SHA-256 (FIPS 180-4), incremental and in plain TypeScript: the engine runs in browsers too, and public points, digests and
 * seeded randomness must come out at once and everywhere the same.
 */

const BLOCK = 64;

/** The first `count` primes, in order. */
function firstPrimes(count: number): number[] {
  const primes: number[] = [];
  for (let candidate = 2; primes.length < count; candidate++) {
    if (primes.every((p) => candidate % p !== 0)) primes.push(candidate);
  }
  return primes;
}

/**
 * The first 32 bits of the fractional part of a root of `x` (FIPS 180-4, 4.2.2 and 5.3.3 define all constants so),
 * by bisection in integers: floor(root(x) * 2^32) mod 2^32.
 */
function rootBits(x: number, degree: 2 | 3): number {
  const target = BigInt(x) << BigInt(32 * degree);
  let low = 0n;
  let high = BigInt(x + 1) << 32n;
  while (high - low > 1n) {
    const middle = (low + high) / 2n;
    if (middle ** BigInt(degree) <= target) low = middle;
    else high = middle;
  }
  return Number(low & 0xffffffffn);
}

const PRIMES = firstPrimes(64);
const ROUND_CONSTANTS = Int32Array.from(PRIMES, (p) => rootBits(p, 3) | 0);
const INITIAL_STATE = Int32Array.from(PRIMES.slice(0, 8), (p) => rootBits(p, 2) | 0);

const rotate = (x: number, by: number): number => (x >>> by) | (x << (32 - by));

/** One computation of a digest over bytes that arrive in pieces. `digest` may be called once; `update` not after it. */
export class Sha256 {
  private readonly state = INITIAL_STATE.slice();
  private readonly block = new Uint8Array(BLOCK);
  private readonly schedule = new Int32Array(64);
  private filled = 0;
  private length = 0;
  private finished = false;

  /** Appends bytes. */
  update(bytes: Uint8Array): this {
    if (this.finished) throw new Error("Sha256.update: the digest was already taken");
    this.length += bytes.length;
    this.absorb(bytes);
    return this;
  }

  /** The 32 bytes of the digest of everything appended. */
  digest(): Uint8Array {
    if (this.finished) throw new Error("Sha256.digest: the digest was already taken");
    this.finished = true;
    const padding = new Uint8Array((this.filled < 56 ? 56 : 120) - this.filled + 8);
    padding[0] = 0x80;
    const tail = new DataView(padding.buffer);
    tail.setUint32(padding.length - 8, Math.floor(this.length / 0x20000000));
    tail.setUint32(padding.length - 4, (this.length << 3) >>> 0);
    this.absorb(padding);
    const out = new Uint8Array(32);
    const view = new DataView(out.buffer);
    this.state.forEach((word, i) => {
      view.setInt32(4 * i, word);
    });
    return out;
  }

  private absorb(bytes: Uint8Array): void {
    let at = 0;
    while (at < bytes.length) {
      const take = Math.min(BLOCK - this.filled, bytes.length - at);
      this.block.set(bytes.subarray(at, at + take), this.filled);
      this.filled += take;
      at += take;
      if (this.filled === BLOCK) {
        this.compress();
        this.filled = 0;
      }
    }
  }

  private compress(): void {
    const w = this.schedule;
    const { block, state } = this;
    for (let t = 0; t < 16; t++) {
      const at = 4 * t;
      w[t] = (block[at]! << 24) | (block[at + 1]! << 16) | (block[at + 2]! << 8) | block[at + 3]!;
    }
    for (let t = 16; t < 64; t++) {
      const early = w[t - 15]!;
      const late = w[t - 2]!;
      const sigma0 = rotate(early, 7) ^ rotate(early, 18) ^ (early >>> 3);
      const sigma1 = rotate(late, 17) ^ rotate(late, 19) ^ (late >>> 10);
      w[t] = (w[t - 16]! + sigma0 + w[t - 7]! + sigma1) | 0;
    }
    // Read and written one by one: taking the state apart as a list would go through an iterator for each block.
    let a = state[0]!;
    let b = state[1]!;
    let c = state[2]!;
    let d = state[3]!;
    let e = state[4]!;
    let f = state[5]!;
    let g = state[6]!;
    let h = state[7]!;
    for (let t = 0; t < 64; t++) {
      const sum1 = rotate(e, 6) ^ rotate(e, 11) ^ rotate(e, 25);
      const first = (h + sum1 + ((e & f) ^ (~e & g)) + ROUND_CONSTANTS[t]! + w[t]!) | 0;
      const sum0 = rotate(a, 2) ^ rotate(a, 13) ^ rotate(a, 22);
      const second = (sum0 + ((a & b) ^ (a & c) ^ (b & c))) | 0;
      h = g;
      g = f;
      f = e;
      e = (d + first) | 0;
      d = c;
      c = b;
      b = a;
      a = (first + second) | 0;
    }
    state[0] = (state[0]! + a) | 0;
    state[1] = (state[1]! + b) | 0;
    state[2] = (state[2]! + c) | 0;
    state[3] = (state[3]! + d) | 0;
    state[4] = (state[4]! + e) | 0;
    state[5] = (state[5]! + f) | 0;
    state[6] = (state[6]! + g) | 0;
    state[7] = (state[7]! + h) | 0;
  }
}

/** The SHA-256 digest (32 bytes) of `bytes`. */
export function sha256(bytes: Uint8Array): Uint8Array {
  return new Sha256().update(bytes).digest();
}
