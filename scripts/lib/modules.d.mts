interface LockedPackage {
  readonly version?: string;
  readonly integrity?: string;
  readonly optional?: boolean;
  readonly extraneous?: boolean;
}

interface Packages {
  readonly packages: Readonly<Record<string, LockedPackage>>;
}

export function demandNode(version?: string): void;
export function missingModules(lockfile: Packages, installed: Packages | undefined): string[];
