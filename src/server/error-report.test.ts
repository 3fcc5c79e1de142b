import { DrizzleQueryError } from "drizzle-orm/errors";
import { describe, expect, it } from "vitest";
import { errorReport } from "./error-report";

describe("errorReport", () => {
  it("tells the database's code of a failed query, never its parameters", () => {
    const cause = Object.assign(new Error("Duplicate entry 'secret' for key 'x'"), {
      code: "ER_DUP_ENTRY",
      sql: "insert into users values ('secret')",
    });
    for (const error of [new DrizzleQueryError("insert", ["secret\n    at secret"], cause), cause]) {
      const report = errorReport(error);
      expect(report.error).toBe("ER_DUP_ENTRY");
      expect(JSON.stringify(report)).not.toContain("secret");
      expect(report.stack).toContain("error-report.test");
    }
  });

  it("tells the message and the place of any other error", () => {
    expect(errorReport(new Error("A plan has no document."))).toMatchObject({
      error: "A plan has no document.",
      stack: expect.stringMatching(/^ {4}at /),
    });
    expect(errorReport("thrown text")).toEqual({ error: "string" });
  });
});
