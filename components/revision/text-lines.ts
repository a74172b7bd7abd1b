/** The lines of a text without their line ends (CR LF, LF or CR), as the parsers count them; a final line end opens no line. */
export function textLines(text: string): string[] {
  const lines = text.split(/\r\n|\n|\r/);
  if (lines.length > 1 && lines[lines.length - 1] === "") lines.pop();
  return lines;
}
