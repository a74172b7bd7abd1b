export class Trouble extends Error {
  constructor(message: string);
}

export class CommandFailed extends Error {
  readonly output: string;
  constructor(ended: {
    readonly command: string;
    readonly code: number | null;
    readonly signal?: string | null;
    readonly output: string;
  });
}

export class Interrupted extends Error {}

export function isDiskFull(error: unknown): boolean;
export function lastLines(text: string, count?: number): string;
export function explain(error: unknown, doing: string): string;
