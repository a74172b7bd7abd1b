/** A failure that a person can act on: its message is the whole sentence that is shown, without a stack. */
export class Trouble extends Error {
  /** @param {string} message */
  constructor(message) {
    super(message);
    this.name = "Trouble";
  }
}

/** A command that ended badly; keeps what it printed, so that the cause can be told. */
export class CommandFailed extends Error {
  /** @param {{ command: string, code: number | null, signal?: string | null, output: string }} ended */
  constructor({ command, code, signal, output }) {
    super(`${command} ended with ${signal ? `signal ${signal}` : `code ${code}`}`);
    this.name = "CommandFailed";
    this.command = command;
    this.code = code;
    this.output = output;
  }
}

/** The person asked to stop (Ctrl-C, SIGTERM): no failure, but nothing may go on. */
export class Interrupted extends Error {
  constructor() {
    super("Stopped on request.");
    this.name = "Interrupted";
  }
}

const DISK_FULL = /\bENOSPC\b|No space left on device|\bEDQUOT\b|Disk quota exceeded/i;
const NO_RIGHT = new Set(["EACCES", "EPERM", "EROFS"]);

/** Whether an error, or what a command printed, says that the disk has no space left. */
export function isDiskFull(error) {
  return DISK_FULL.test([error?.code, error?.message, error?.output].filter(Boolean).join("\n"));
}

/** The last lines of a text that say something, joined: enough to see a cause, short enough to read. */
export function lastLines(text, count = 3) {
  const lines = text
    .split("\n")
    .map((line) => line.trim())
    .filter(Boolean);
  return lines.slice(-count).join(" / ");
}

const TELLING = /\b(error|fatal|cannot|can't|not found|denied|refused)\b/i;

/** The first lines that name a cause; the last ones where none does. */
function cause(output) {
  const telling = output.split("\n").filter((line) => TELLING.test(line));
  return lastLines(telling.slice(0, 2).join("\n")) || lastLines(output) || "it printed nothing";
}

/**
 * Turns whatever was thrown while `doing` into one sentence.
 * A Trouble already is one; anything else is told with its cause.
 */
export function explain(error, doing) {
  if (error instanceof Trouble || error instanceof Interrupted) return error.message;
  const kept = "What was there before is kept.";
  if (isDiskFull(error))
    return `The disk is full: there was no space left while ${doing}${at(error)}. ${kept} Free some space and run the same command again.`;
  if (NO_RIGHT.has(error?.code) && error.path)
    return `This user may not write ${error.path} (${error.code}), which was needed while ${doing}. ${kept} Give the right to it, or work in a folder of your own.`;
  if (error instanceof CommandFailed)
    return `${error.message} while ${doing}: ${cause(error.output)}. ${kept}`;
  return `Something failed while ${doing}: ${error?.message ?? error}. ${kept}`;
}

function at(error) {
  return error?.path ? ` (${error.path})` : "";
}
