export function identify(pid: number): string | undefined;
export function living(name: string): number | undefined;
export function createUsers(folder: string): {
  enter(): void;
  leave(): void;
  others(): boolean;
};
