export function parsePort(text: string | undefined, fallback: number): number;
export function isFree(port: number): Promise<boolean>;
export function pickPort(preferred: number | undefined): Promise<number>;
