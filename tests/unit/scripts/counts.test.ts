import { describe, expect, test } from "vitest";
import { countPlaywright, countVitest, total } from "../../../scripts/lib/counts.mjs";

describe("a Vitest report", () => {
  const file = (status: string, tests: number) => ({ status, assertionResults: Array(tests).fill({}) });

  test("gives its passed and failed tests", () => {
    const report = { numPassedTests: 7, numFailedTests: 2, testResults: [file("failed", 9)] };
    expect(countVitest(report)).toEqual({ passed: 7, failed: 2 });
  });

  test("counts a file that could not be loaded as one failure", () => {
    const report = {
      numPassedTests: 7,
      numFailedTests: 0,
      testResults: [file("passed", 7), file("failed", 0)],
    };
    expect(countVitest(report)).toEqual({ passed: 7, failed: 1 });
  });

  test("counts skipped tests and those yet to be written as failures", () => {
    const report = {
      numPassedTests: 1,
      numFailedTests: 0,
      numPendingTests: 2,
      numTodoTests: 1,
      testResults: [],
    };
    expect(countVitest(report)).toEqual({ passed: 1, failed: 3 });
  });

  test("that is missing is a failure", () => {
    expect(countVitest(undefined)).toEqual({ passed: 0, failed: 1 });
  });
});

describe("a Playwright report", () => {
  test("counts skipped tests and errors outside of tests as failures", () => {
    const report = { stats: { expected: 5, unexpected: 1, flaky: 0, skipped: 2 }, errors: [{}] };
    expect(countPlaywright(report)).toEqual({ passed: 5, failed: 4 });
  });

  test("counts a test that passed only when repeated as a failure", () => {
    const report = { stats: { expected: 5, unexpected: 0, flaky: 1, skipped: 0 }, errors: [] };
    expect(countPlaywright(report)).toEqual({ passed: 5, failed: 1 });
  });

  test("that is missing is a failure", () => {
    expect(countPlaywright(undefined)).toEqual({ passed: 0, failed: 1 });
  });
});

test("the total is the sum of all steps", () => {
  const steps = [
    { passed: 3, failed: 0 },
    { passed: 4, failed: 2 },
  ];
  expect(total(steps)).toEqual({ passed: 7, failed: 2 });
});
