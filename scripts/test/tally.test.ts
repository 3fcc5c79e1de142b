import { expect, test } from "vitest";
import { tallyReport } from "./tally";

const file = (statuses: Record<string, string>, status = "passed") => ({
  name: "a.test.ts",
  status,
  message: "",
  assertionResults: Object.entries(statuses).map(([fullName, one]) => ({ fullName, status: one })),
});
const tally = (files: unknown[], exitStatus = 0, allowed: Record<string, string> = {}) => {
  const complaints: string[] = [];
  return {
    ...tallyReport({ testResults: files }, exitStatus, allowed, (line) => complaints.push(line)),
    complaints,
  };
};

test("passed and failed tests are counted", () => {
  expect(tally([file({ a: "passed", b: "failed" }), file({ c: "passed" })], 1)).toMatchObject({
    passed: 2,
    failed: 1,
  });
});

test.each(["skipped", "pending", "todo", "disabled"])(
  "a %s test counts as failed unless it is allowed",
  (status) => {
    expect(tally([file({ a: "passed", b: status })])).toMatchObject({ passed: 1, failed: 1 });
    expect(tally([file({ a: "passed", b: status })], 0, { b: "why" })).toMatchObject({
      passed: 1,
      failed: 0,
    });
  },
);

test("a file that could not be loaded counts as failed", () => {
  expect(tally([file({ a: "passed" }), file({}, "failed")], 1)).toMatchObject({ passed: 1, failed: 1 });
});

test("a run that failed outside its tests counts as failed", () => {
  expect(tally([file({ a: "passed" })], 1)).toMatchObject({
    passed: 1,
    failed: 1,
    complaints: ["vitest ended with status 1 although no test failed"],
  });
});

test("no report and no tests count as failed", () => {
  expect(tallyReport(undefined, 1, {}, () => {})).toEqual({ passed: 0, failed: 1 });
  expect(tally([])).toMatchObject({ passed: 0, failed: 1 });
});
