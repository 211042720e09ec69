/** How the components of exterior products are made, as tables that both evaluators read. */
import { ascendingSubsets, isOddShuffle } from "./subsets";

/** One product of two components with a sign: 1 for odd (negative). */
export interface WedgeProduct {
  readonly left: number;
  readonly right: number;
  readonly odd: 0 | 1;
}

/** For each component of degree `degree` + 1, in order, the degree + 1 products it is the sum of: component of w times entry of r. */
export function wedgeTable(k: number, degree: number): readonly (readonly WedgeProduct[])[] {
  const places = new Map(ascendingSubsets(k, degree).map((set, place) => [set, place]));
  return ascendingSubsets(k, degree + 1).map((set) => {
    const products: WedgeProduct[] = [];
    for (let column = 0; column < k; column++) {
      const bit = 1 << column;
      if ((set & bit) === 0) continue;
      products.push({ left: places.get(set ^ bit)!, right: column, odd: isOddShuffle(set ^ bit, bit) ? 1 : 0 });
    }
    return products;
  });
}

/** The products whose sum is the top component of v (degree `degree`) times w (degree k - `degree`). */
export function pairTable(k: number, degree: number): readonly WedgeProduct[] {
  const whole = (1 << k) - 1;
  const places = new Map(ascendingSubsets(k, k - degree).map((set, place) => [set, place]));
  return ascendingSubsets(k, degree).map((set, left) => ({
    left,
    right: places.get(whole ^ set)!,
    odd: isOddShuffle(set, whole ^ set) ? 1 : 0,
  }));
}
