/** Rates in processor time, so that what else the machine does counts little; medians of several rounds. */

const processorSeconds = (): number => process.cpuUsage().user / 1e6;

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/** How often `work` runs in a second of processor time, measured for about `seconds` after one run to warm up. */
export function rate(work: () => void, seconds: number): number {
  work();
  const start = processorSeconds();
  let runs = 0;
  let now = start;
  // The clock of processor time is coarse: it is read after every doubling only.
  for (let batch = 1; now - start < seconds; batch *= 2) {
    for (let i = 0; i < batch; i++) work();
    runs += batch;
    now = processorSeconds();
  }
  return runs / (now - start);
}

/** The median of the seconds of processor time that `work` takes. */
export function duration(work: () => void, rounds: number): number {
  const times: number[] = [];
  for (let i = 0; i < rounds; i++) {
    const start = processorSeconds();
    work();
    times.push(processorSeconds() - start);
  }
  return median(times);
}

/** The exponent b of y = a x^b through points by least squares of the logarithms. */
export function exponent(points: readonly (readonly [x: number, y: number])[]): number {
  const logs = points.map(([x, y]) => [Math.log(x), Math.log(y)] as const);
  const [mx, my] = [0, 1].map((i) => logs.reduce((sum, point) => sum + point[i as 0 | 1], 0) / logs.length) as [
    number,
    number,
  ];
  const above = logs.reduce((sum, [x, y]) => sum + (x - mx) * (y - my), 0);
  return above / logs.reduce((sum, [x]) => sum + (x - mx) ** 2, 0);
}
