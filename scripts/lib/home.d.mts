export function homeFolder(env?: Readonly<Record<string, string | undefined>>): string;
export function ensureHome(home: string): string;
export function readJson(file: string): unknown;
export function writePrivate(file: string, content: string): void;
export function writeJson(file: string, value: unknown): void;
