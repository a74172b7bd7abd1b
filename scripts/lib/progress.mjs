const BEAT_MS = 10_000;

const seconds = (from) => ((Date.now() - from) / 1000).toFixed(1);

/**
 * Shows steps as they run: one line when a step ends, with its seconds; while it runs, what it is doing.
 * On a terminal the running line is rewritten; elsewhere (a log) each change and a beat every ten seconds is a line.
 */
export function createProgress(stream = process.stdout) {
  const terminal = stream.isTTY === true;
  const write = (text) => stream.write(text);

  /** Runs `work(say)`; the last text said stands in the step's final line. */
  async function step(title, work) {
    const from = Date.now();
    let text = "";
    let shown = "";
    const running = () => `  … ${title}${text ? `: ${text}` : ""} (${seconds(from)} s)`;
    const draw = () => write(terminal ? `\r\x1b[2K${running()}` : `${running()}\n`);
    const say = (next) => {
      text = next;
      if (terminal) draw();
    };
    const timer = setInterval(
      () => {
        if (terminal || Date.now() - from >= BEAT_MS || shown !== text) draw();
        shown = text;
      },
      terminal ? 500 : BEAT_MS,
    );
    const close = (mark) => {
      clearInterval(timer);
      write(
        `${terminal ? "\r\x1b[2K" : ""}  ${mark} ${title}${text ? `: ${text}` : ""} (${seconds(from)} s)\n`,
      );
    };
    try {
      const result = await work(say);
      close("✓");
      return result;
    } catch (error) {
      close("✗");
      throw error;
    }
  }

  return { step, line: (text = "") => write(`${text}\n`) };
}
