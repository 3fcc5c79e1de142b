import type { Role } from "./roles";

/** Where an action takes place; an object outside the principal's organisation or sites does not exist for them. */
export type ScopeKind = "open" | "account" | "organisation" | "site" | "plan";

interface Permission {
  scope: ScopeKind;
  /** Roles that may; `"anyone"` needs no sign-in, `"member"` any signed-in person. */
  allow: readonly Role[] | "anyone" | "member";
}

const everyRole = ["planner", "auditor", "installer", "admin"] as const;
const office = ["planner", "auditor", "admin"] as const;

/** The one table of who may do what: the server's guard, the pages' middleware and the interface all read it. */
export const permissions = {
  "front.read": { scope: "open", allow: "anyone" },
  "health.read": { scope: "open", allow: "anyone" },
  "schema.read": { scope: "open", allow: "anyone" },
  "session.start": { scope: "open", allow: "anyone" },
  "session.end": { scope: "open", allow: "anyone" },
  "account.read": { scope: "account", allow: "member" },
  "account.sign-out-everywhere": { scope: "account", allow: "member" },
  "desk.read": { scope: "organisation", allow: everyRole },
  "catalogue.read": { scope: "organisation", allow: everyRole },
  "screening.run-stateless": { scope: "organisation", allow: everyRole },
  "organisation.read": { scope: "organisation", allow: ["admin"] },
  "member.change-roles": { scope: "organisation", allow: ["admin"] },
  "member.assign-sites": { scope: "organisation", allow: ["admin"] },
  "member.remove": { scope: "organisation", allow: ["admin"] },
  "member.erase": { scope: "organisation", allow: ["admin"] },
  "invitation.accept": { scope: "open", allow: "anyone" },
  "invitation.manage": { scope: "organisation", allow: ["admin"] },
  "activity.read": { scope: "organisation", allow: ["admin", "auditor"] },
  "delivery.read": { scope: "organisation", allow: ["admin"] },
  "delivery.manage": { scope: "organisation", allow: ["admin"] },
  "site.create": { scope: "organisation", allow: ["planner", "admin"] },
  "site.read": { scope: "site", allow: everyRole },
  "site.edit": { scope: "site", allow: ["planner", "admin"] },
  "site.archive": { scope: "site", allow: ["admin"] },
  "site.restore": { scope: "organisation", allow: ["admin"] },
  "site.assign-installers": { scope: "site", allow: ["admin"] },
  "plan.create": { scope: "site", allow: ["planner"] },
  "plan.read": { scope: "plan", allow: office },
  "plan.edit": { scope: "plan", allow: ["planner"] },
  "plan.archive": { scope: "plan", allow: ["admin"] },
  "plan.restore": { scope: "organisation", allow: ["admin"] },
  "drawing.read": { scope: "plan", allow: office },
  "drawing.upload": { scope: "plan", allow: ["planner"] },
  "screening.read": { scope: "plan", allow: office },
  "clamp-meter.read": { scope: "plan", allow: office },
  "screening.run": { scope: "plan", allow: ["planner", "auditor"] },
  "notice.read": { scope: "plan", allow: office },
  "notice.issue": { scope: "plan", allow: ["planner"] },
  "revision.read": { scope: "plan", allow: office },
  "revision.submit": { scope: "plan", allow: ["planner"] },
  "revision.comment": { scope: "plan", allow: ["planner", "auditor"] },
  "revision.recompute": { scope: "plan", allow: ["planner", "auditor"] },
  "revision.decide": { scope: "plan", allow: ["auditor"] },
  "revision.release": { scope: "plan", allow: ["auditor"] },
  "revision.return": { scope: "plan", allow: ["auditor"] },
} as const satisfies Record<string, Permission>;

export type Action = keyof typeof permissions;

/** A signed-in person as the guard sees them. `siteIds` limits whoever holds no role but installer. */
export interface Member {
  kind: "member";
  userId: string;
  organisationId: string;
  name: string;
  roles: readonly Role[];
  siteIds: readonly string[];
}

export interface Anonymous {
  kind: "anonymous";
}

export type Principal = Member | Anonymous;

/** Whether the roles of `principal` allow `action` at all, wherever it takes place. */
export function mayAct(principal: Principal, action: Action): boolean {
  const { allow }: Permission = permissions[action];
  if (allow === "anyone") return true;
  if (principal.kind !== "member") return false;
  return allow === "member" || principal.roles.some((role) => allow.includes(role));
}

/** Whether `principal` can see the site at all: installers see the sites they are assigned to. */
export function maySeeSite(member: Member, siteId: string): boolean {
  return member.roles.some((role) => role !== "installer") || member.siteIds.includes(siteId);
}
