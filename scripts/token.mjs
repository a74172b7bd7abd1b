import { existsSync } from "node:fs";
import path from "node:path";
import { readArguments } from "./lib/arguments.mjs";
import { Cluster } from "./lib/cluster.mjs";
import { runOn } from "./lib/data.mjs";
import { databaseOn } from "./lib/database.mjs";
import { homeFolder } from "./lib/home.mjs";
import { CommandFailed, explain, lastLines, Trouble } from "./lib/trouble.mjs";

const USAGE = "Use: npm run token -- --role viewer|technician|engineer|approver|admin --name NAME";

/** Runs `work` on the desk's database; its own cluster is started for as long as that takes, should it stand still. */
async function onDatabase(work) {
  if (process.env.DATABASE_URL) return work(process.env.DATABASE_URL);
  const home = homeFolder();
  if (!existsSync(path.join(home, "cluster.json")))
    throw new Trouble(`There is no desk in ${home} yet. Run npm start once, then this again.`);
  const cluster = new Cluster({ home });
  try {
    await cluster.start();
    return await work(databaseOn(cluster.url, "keepstep"));
  } finally {
    await cluster.stop();
  }
}

async function main() {
  const { role, name } = readArguments(process.argv.slice(2), { role: "text", name: "text" });
  if (!role || !name) throw new Trouble(USAGE);
  const args = ["--role", role, "--name", name];
  const { output } = await onDatabase((url) => runOn(url, "scripts/token.ts", { args }));
  process.stdout.write(output);
}

try {
  await main();
} catch (error) {
  const told = error instanceof CommandFailed ? lastLines(error.output) : explain(error, "making a token");
  process.stderr.write(`${told}\n`);
  process.exitCode = 1;
}
