import { Refusal } from "~/domain/errors";
import type { Role } from "~/domain/roles";

export interface RoleChange {
  granted: Role[];
  withdrawn: Role[];
}

interface Wish {
  /** Whether somebody changes their own roles. */
  ofOneself: boolean;
  before: readonly Role[];
  after: readonly Role[];
  /** Whether anybody else in the organisation is admin. */
  othersAreAdmin: boolean;
}

/**
 * What changes, if the rules let it: nobody makes themselves auditor (four eyes), and an organisation keeps an admin.
 * @throws Refusal permission.denied, state.conflict
 */
export function judgeRoleChange({ ofOneself, before, after, othersAreAdmin }: Wish): RoleChange {
  const granted = after.filter((role) => !before.includes(role));
  const withdrawn = before.filter((role) => !after.includes(role));
  if (ofOneself && granted.includes("auditor"))
    throw new Refusal(
      "permission.denied",
      "Nobody makes themselves auditor: what one person draws, another must release. Ask another admin.",
    );
  if (withdrawn.includes("admin") && !othersAreAdmin)
    throw new Refusal(
      "state.conflict",
      "This is the organisation's last admin. Make somebody else admin first, then take the role away here.",
    );
  return { granted, withdrawn };
}
