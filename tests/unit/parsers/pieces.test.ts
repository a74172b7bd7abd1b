import { expect, test } from "vitest";
import { Pieces } from "@/lib/parsers/pieces";

test("room for a broken number of pieces loses none", () => {
  const pieces = new Pieces(100 / 6);
  for (let i = 0; i < 200; i++) pieces.add(1, i, i + 1);
  expect(pieces.triples()).toHaveLength(600);
  expect(pieces.start(199)).toBe(199);
});
