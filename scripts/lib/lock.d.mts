export interface Lock {
  release(): Promise<void>;
}

interface LockName {
  readonly folder: string;
  readonly name: string;
}

export function takeLock(options: LockName & { readonly describe: () => string }): Promise<Lock>;
export function inTurn<T>(
  options: LockName & { readonly signal?: AbortSignal },
  work: () => Promise<T>,
): Promise<T>;
