/** Upper bounds on the amplitude of gluonCurrents.ts, carried through the same recursion. */
import { addBounds, type Bound, multiplyBounds, polynomial, reciprocal } from "./bound";

const bits = Math.log2;
/** A scalar product of two vectors of four components has four terms. */
const dot = polynomial(0, 2);

/** The bound of the scaled amplitude of n legs at the twistors of a point and its reference twistor. */
export function currentBound(n: number, negativeLegs: readonly number[]): Bound {
  const name = (leg: number): number => (leg + n) % n;
  const step = (leg: number) => reciprocal(`<${name(leg)} ${name(leg + 1)}>`, 2, 1);
  // lambdatilde times <a-1 a><a a+1> has degree 3 and six monomials, its bracket with the reference degree 4 and twelve.
  const leg = (a: number): Bound =>
    negativeLegs.includes(a + 1)
      ? multiplyBounds(polynomial(6, 2), reciprocal(`[${a} *]`, 4, bits(12)))
      : multiplyBounds(polynomial(4, bits(6)), step(a - 1), step(a), reciprocal(`<${a} *>`, 2, 1));
  // P = x_first - x_{last+1}, and P^2 = <first-1 first last last+1> / (<first-1 first><last last+1>).
  const momentum = (first: number, last: number) => multiplyBounds(polynomial(4, 3), step(first - 1), step(last));
  const propagator = (first: number, last: number) =>
    multiplyBounds(polynomial(4, 2), reciprocal(`<${name(first - 1)} ${first} ${last} ${last + 1}>`, 4, bits(24)));

  const currents = new Map<string, Bound>();
  const current = (first: number, last: number): Bound => {
    if (first === last) return leg(first);
    const key = `${first} ${last}`;
    const found = currents.get(key);
    if (found !== undefined) return found;
    const value = multiplyBounds(propagator(first, last), amputated(first, last));
    currents.set(key, value);
    return value;
  };
  const amputated = (first: number, last: number): Bound => {
    const sums: Bound[] = [];
    for (let split = first; split < last; split++) {
      const [j1, j2] = [current(first, split), current(split + 1, last)];
      for (const p of [momentum(first, split), momentum(split + 1, last)]) {
        // Twice (P.J) J and once (J.J) P: three scalar products in size.
        sums.push(multiplyBounds(polynomial(0, bits(3)), dot, j1, j2, p));
      }
      for (let third = split + 1; third < last; third++) {
        const three = multiplyBounds(j1, current(split + 1, third), current(third + 1, last));
        // Four, two and two scalar products.
        sums.push(multiplyBounds(polynomial(0, 3), dot, three));
      }
    }
    return addBounds(sums);
  };
  return multiplyBounds(dot, amputated(0, n - 2), leg(n - 1));
}
