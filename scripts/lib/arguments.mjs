import { Trouble } from "./trouble.mjs";

/**
 * Reads `--name=value`, `--name value` and `--flag` after a table of what is known: { name: "text" | "flag" }.
 * Anything unknown is refused, so that a typing mistake does not silently change what runs.
 */
export function readArguments(words, known) {
  const read = {};
  for (let index = 0; index < words.length; index += 1) {
    const [, name, inline] = /^--([a-z-]+)(?:=(.*))?$/s.exec(words[index]) ?? [];
    const kind = name === undefined ? undefined : known[name];
    if (kind === undefined)
      throw new Trouble(
        `"${words[index]}" is not known here. Known: ${Object.keys(known).map(spell).join(", ")}.`,
      );
    if (kind === "flag" && inline === undefined) read[name] = true;
    else if (kind === "flag") throw new Trouble(`--${name} takes no value.`);
    else {
      const value = inline ?? words[(index += 1)];
      if (value === undefined || value === "") throw new Trouble(`--${name} needs a value.`);
      read[name] = value;
    }
  }
  return read;
}

const spell = (name) => `--${name}`;

/** The parts of a comma-separated list, each of which must be known; all of them where nothing was given. */
export function chooseParts(text, known) {
  if (text === undefined) return [...known];
  const parts = text.split(",").map((part) => part.trim());
  const strange = parts.find((part) => !known.includes(part));
  if (strange !== undefined)
    throw new Trouble(`"${strange}" is no part of this. Known: ${known.join(", ")}.`);
  return known.filter((part) => parts.includes(part));
}
