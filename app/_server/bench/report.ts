/** What the bench found. Ratios are such that larger is better; times are of the processor. */
export interface Report {
  readonly entries: { readonly name: string; readonly median: number; readonly unit: string }[];
  readonly ratios: {
    readonly name: string;
    readonly value: number;
    readonly target: number;
    readonly meets: boolean;
  }[];
  /** What could not be measured, and why. */
  readonly notes: string[];
}

export const addRatio = (report: Report, name: string, value: number, target: number): void => {
  report.ratios.push({ name, value, target, meets: value >= target });
};
