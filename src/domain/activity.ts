/** Everything that the activity log records, with what it says of it. Closed: a new deed is a new line here. */
export const activityEvents = {
  "session.started": "signed in",
  "session.ended": "signed out",
  "session.all-ended": "signed out everywhere",
  "member.added": "added a member",
  "member.roles-changed": "changed the roles of a member",
  "site.created": "created the site",
  "site.changed": "changed the site",
  "contact.added": "added somebody to notify",
  "contact.removed": "removed somebody to notify",
  "plan.created": "created the plan",
  "plan.renamed": "renamed the plan",
  "drawing.uploaded": "uploaded a drawing",
  "plan.screened": "screened the plan",
  "notice.composed": "composed a notice",
  "notice.issued": "issued a notice",
  "delivery.sent": "delivered a notice",
  "delivery.failed": "could not deliver a notice",
} as const;

export type ActivityEvent = keyof typeof activityEvents;

export type ActivitySubject =
  "session" | "member" | "site" | "plan" | "drawing" | "screening" | "notice" | "delivery";
