/** Deciding primality of integers up to 64 bits, exactly. */

/** base^exponent mod modulus; exponent >= 0, modulus >= 1, result in 0..modulus-1. */
export function powerModulo(base: bigint, exponent: bigint, modulus: bigint): bigint {
  let result = 1n % modulus;
  let square = ((base % modulus) + modulus) % modulus;
  for (let e = exponent; e > 0n; e >>= 1n) {
    if (e & 1n) result = (result * square) % modulus;
    square = (square * square) % modulus;
  }
  return result;
}

/** With these bases the strong pseudoprime test is a proof below 3.3 * 10^24 (Math. Comp. 86 (2017) 985). */
const WITNESSES = [2n, 3n, 5n, 7n, 11n, 13n, 17n, 19n, 23n, 29n, 31n, 37n] as const;

/**
 * Whether `n` is a prime number, by the strong pseudoprime test with bases that leave no exception up to 2^64.
 * @throws Error when n >= 2^64, where the answer would not be certain.
 */
export function isPrime(n: bigint): boolean {
  if (n >= 1n << 64n) throw new Error(`isPrime: expected n < 2^64, got ${n}`);
  if (n < 2n) return false;
  for (const p of WITNESSES) {
    if (n % p === 0n) return n === p;
  }
  let odd = n - 1n;
  let twos = 0;
  while ((odd & 1n) === 0n) {
    odd >>= 1n;
    twos++;
  }
  return WITNESSES.every((base) => passes(base, n, odd, twos));
}

/** Whether base^odd is 1, or one of its first `twos` squarings is -1, modulo n = odd * 2^twos + 1. */
function passes(base: bigint, n: bigint, odd: bigint, twos: number): boolean {
  let x = powerModulo(base, odd, n);
  if (x === 1n || x === n - 1n) return true;
  for (let i = 1; i < twos; i++) {
    x = (x * x) % n;
    if (x === n - 1n) return true;
  }
  return false;
}
