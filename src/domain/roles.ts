/** What a member of an organisation may be; one person may hold several. */
export const roles = ["planner", "auditor", "installer", "admin"] as const;

export type Role = (typeof roles)[number];

export const roleDescriptions: Record<Role, string> = {
  planner: "draws plans, screens them and issues notices",
  auditor: "reviews flagged positions and releases revisions",
  installer: "receives notices, acknowledges positions and enters readings on site",
  admin: "keeps members, sign-in, catalogues and deliveries",
};
