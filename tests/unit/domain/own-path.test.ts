import { expect, test } from "vitest";
import { ownPath } from "@/lib/domain/own-path";

test.each(["/changes", "/machines/1?tab=drift", "/floor?siteId=a&level=over"])(
  "%s is come back to after signing in",
  (path) => {
    expect(ownPath(path)).toBe(path);
  },
);

test.each([
  null,
  undefined,
  "",
  "https://elsewhere.example/",
  "//elsewhere.example/",
  "/\\elsewhere.example/",
  "\\\\elsewhere.example",
  "javascript:alert(1)",
  "/\t/elsewhere.example",
  "floor",
  "/sign-in?next=/sign-in",
  "/api/auth/signout",
])("%s leads to the floor instead", (path) => {
  expect(ownPath(path)).toBe("/floor");
});
