/** Runs once when the server starts, before the first request; never during a build. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { startServer } = await import("./instrumentation-node");
  await startServer();
}
