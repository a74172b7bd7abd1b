export function query(
  url: string,
  sql: string,
  values?: readonly unknown[],
): Promise<Record<string, unknown>[]>;
export function databaseOn(serverUrl: string, name: string): string;
export function ensureDatabase(serverUrl: string, name: string): Promise<string>;
export function copyDatabase(
  serverUrl: string,
  names: { readonly name: string; readonly template: string },
): Promise<string>;
export function dropDatabase(serverUrl: string, name: string): Promise<void>;
