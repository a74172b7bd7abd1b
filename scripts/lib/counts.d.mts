export interface Counts {
  readonly passed: number;
  readonly failed: number;
}

export function countVitest(report: unknown): Counts;
export function countPlaywright(report: unknown): Counts;
export function total(results: readonly Counts[]): Counts;
