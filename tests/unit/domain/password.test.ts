import { expect, test } from "vitest";
import { passwordProblem } from "@/lib/domain/password";
import { demoPeople } from "../../../scripts/demo-people.mjs";

const owner = { email: "nora.velten@example.test", name: "Nora Velten" };

test("length is what counts: spaces, one case and no digits will do", () => {
  expect(passwordProblem("warm belt slow gantry", owner)).toBeNull();
  expect(passwordProblem("ünïcødé ïs fïne", owner)).toBeNull();
});

test("eleven characters are too few, twelve and two hundred will do, one more is too many", () => {
  const varied = "qzxwvutsrpom".repeat(20);
  expect(passwordProblem(varied.slice(0, 11), owner)).toMatch(/^A password has at least 12 characters/);
  expect(passwordProblem(varied.slice(0, 12), owner)).toBeNull();
  expect(passwordProblem(varied.slice(0, 200), owner)).toBeNull();
  expect(passwordProblem(varied.slice(0, 201), owner)).toMatch(/at most 200/);
});

test("the same few characters over and over are refused", () => {
  expect(passwordProblem("abababababababab", owner)).toMatch(/at least 5 different/);
});

test.each([
  "nora.velten@example.test",
  "NORA.VELTEN@EXAMPLE.TEST",
  "Nora Velten 2026",
  "noravelten12",
  "keepstep-keepstep",
  "password-nora",
])("%s is refused for Nora Velten, who would be guessed", (password) => {
  expect(passwordProblem(password, owner)).toMatch(/more than a name/);
});

test("the demo's people have passwords that the desk itself would take", () => {
  for (const person of demoPeople()) expect(passwordProblem(person.password, person)).toBeNull();
});
