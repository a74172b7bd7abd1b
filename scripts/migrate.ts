import { openMigrator } from "./migrator";

const USAGE = "Use: migrate.ts up | down | pending, with DATABASE_URL set.";

const ACTS = {
  up: (umzug) => umzug.up(),
  down: (umzug) => umzug.down(),
  pending: (umzug) => umzug.pending(),
} satisfies Record<
  string,
  (umzug: Awaited<ReturnType<typeof openMigrator>>["umzug"]) => Promise<{ name: string }[]>
>;

async function main(word: string | undefined, url: string | undefined): Promise<void> {
  if (!url || word === undefined || !(word in ACTS)) throw new Error(USAGE);
  const { umzug, close } = await openMigrator(url);
  try {
    for (const { name } of await ACTS[word as keyof typeof ACTS](umzug)) console.log(`${word} ${name}`);
  } finally {
    await close();
  }
}

main(process.argv[2], process.env.DATABASE_URL).catch((error: Error) => {
  console.error(error.message);
  process.exitCode = 1;
});
