import { describe, expect, it } from "vitest";
import { Refusal } from "~/domain/errors";
import type { Role } from "~/domain/roles";
import { judgeRoleChange } from "./role-change";

const judge = (before: Role[], after: Role[], { ofOneself = false, othersAreAdmin = true } = {}) =>
  judgeRoleChange({ before, after, ofOneself, othersAreAdmin });

describe("a change of roles", () => {
  it("tells what is granted and what is withdrawn", () => {
    expect(judge(["planner", "admin"], ["planner", "auditor"])).toEqual({
      granted: ["auditor"],
      withdrawn: ["admin"],
    });
  });

  it("makes nobody auditor by their own hand", () => {
    expect(() => judge(["admin"], ["admin", "auditor"], { ofOneself: true })).toThrow(Refusal);
    expect(judge(["admin", "auditor"], ["admin", "auditor", "planner"], { ofOneself: true }).granted).toEqual(
      ["planner"],
    );
  });

  it("leaves the organisation an admin", () => {
    expect(() => judge(["admin"], ["planner"], { othersAreAdmin: false })).toThrow(Refusal);
    expect(judge(["planner"], ["auditor"], { othersAreAdmin: false }).granted).toEqual(["auditor"]);
  });
});
