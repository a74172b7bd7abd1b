import { describe, expect, test } from "vitest";
import { chooseParts, readArguments } from "../../../scripts/lib/arguments.mjs";

describe("arguments", () => {
  const known = { role: "text", name: "text", long: "flag" } as const;

  test("are read with an equals sign or a space", () => {
    expect(readArguments(["--role=engineer", "--name", "line 4", "--long"], known)).toEqual({
      role: "engineer",
      name: "line 4",
      long: true,
    });
  });

  test("may hold an equals sign in their value", () => {
    expect(readArguments(["--name=a=b"], known)).toEqual({ name: "a=b" });
  });

  test.each([
    [["--rule=x"], '"--rule=x" is not known here. Known: --role, --name, --long.'],
    [["engineer"], '"engineer" is not known here. Known: --role, --name, --long.'],
    [["--role"], "--role needs a value."],
    [["--role="], "--role needs a value."],
    [["--long=yes"], "--long takes no value."],
  ])("%j are refused", (words, message) => {
    expect(() => readArguments(words, known)).toThrow(message);
  });
});

describe("parts", () => {
  const known = ["static", "unit", "e2e"];

  test("are all there are when none is named", () => {
    expect(chooseParts(undefined, known)).toEqual(known);
  });

  test("keep their own order, whatever the order they were named in", () => {
    expect(chooseParts("e2e, static", known)).toEqual(["static", "e2e"]);
  });

  test("that are unknown are refused", () => {
    expect(() => chooseParts("unit,speed", known)).toThrow(
      '"speed" is no part of this. Known: static, unit, e2e.',
    );
  });
});
