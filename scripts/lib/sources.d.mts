export function sourceFiles(root?: string): string[];
export function hashSources(root?: string): string;
