/** Arithmetic of leg labels, 1..n around the circle. */

/** The label 1..n equal to `a` modulo n. */
export function wrapLabel(n: number, a: number): number {
  const r = a % n;
  return r <= 0 ? r + n : r;
}

/** bar(i), the labels (i-1, i, i+1) of the plane dual to leg i. */
export const barLabels = (n: number, i: number): readonly [number, number, number] => [
  wrapLabel(n, i - 1),
  wrapLabel(n, i),
  wrapLabel(n, i + 1),
];

/** The labels from, from+1, ..., to around the circle, both ends included; all n of them where to = from-1. */
export function cyclicRange(n: number, from: number, to: number): number[] {
  const first = wrapLabel(n, from);
  const count = wrapLabel(n, to - first + 1);
  return Array.from({ length: count }, (_, i) => wrapLabel(n, first + i));
}
