/** Runs one statement on the database of this connection string and gives its rows. */
export async function query(url, sql, values = []) {
  const { default: pg } = await import("pg");
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 5_000 });
  client.on("error", () => undefined);
  try {
    await client.connect();
    return (await client.query(sql, values)).rows;
  } finally {
    await client.end().catch(() => undefined);
  }
}

/** The connection string of another database on the same server. */
export function databaseOn(serverUrl, name) {
  const url = new URL(serverUrl);
  url.pathname = `/${name}`;
  return url.href;
}

/** Makes the database where there is none yet; gives its connection string. */
export async function ensureDatabase(serverUrl, name) {
  const found = await query(serverUrl, "select 1 from pg_database where datname = $1", [name]);
  if (found.length === 0) await query(serverUrl, `create database "${name}"`);
  return databaseOn(serverUrl, name);
}

/** Makes a database as a copy of one that nobody is connected to; gives its connection string. */
export async function copyDatabase(serverUrl, { name, template }) {
  await query(serverUrl, `create database "${name}" template "${template}"`);
  return databaseOn(serverUrl, name);
}

/** Removes the database, whoever is connected to it. */
export async function dropDatabase(serverUrl, name) {
  await query(serverUrl, `drop database if exists "${name}" with (force)`);
}
