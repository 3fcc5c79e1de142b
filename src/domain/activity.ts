/** Everything that the activity log records, with what it says of it. Closed: a new deed is a new line here. */
export const activityEvents = {
  "session.started": "signed in",
  "session.ended": "signed out",
  "session.all-ended": "signed out everywhere",
  "member.added": "added a member",
  "member.roles-changed": "changed the roles of a member",
  "member.sites-changed": "changed which sites a member sees",
  "member.removed": "removed a member",
  "member.reinstated": "made a former member a member again",
  "member.erased": "erased name and address of a former member",
  "invitation.made": "invited somebody",
  "invitation.sent-again": "had an invitation sent again",
  "invitation.withdrawn": "withdrew an invitation",
  "invitation.accepted": "accepted an invitation",
  "site.created": "created the site",
  "site.changed": "changed the site",
  "site.archived": "archived the site",
  "site.restored": "restored the site",
  "site.installers-changed": "changed the installers of the site",
  "contact.added": "added somebody to notify",
  "contact.removed": "removed somebody to notify",
  "plan.created": "created the plan",
  "plan.renamed": "renamed the plan",
  "plan.archived": "archived the plan",
  "plan.restored": "restored the plan",
  "drawing.uploaded": "uploaded a drawing",
  "plan.screened": "screened the plan",
  "notice.composed": "composed a notice",
  "notice.issued": "issued a notice",
  "delivery.sent": "delivered a message",
  "delivery.failed": "could not deliver a message",
  "delivery.tried-again": "had a delivery tried again",
  "delivery.given-up": "gave a delivery up",
  "revision.submitted": "submitted a revision",
  "revision.commented": "commented on a position",
  "revision.decided": "decided on a position",
  "revision.returned": "returned a revision",
  "revision.released": "released a revision",
  "revision.superseded": "superseded a revision",
  "revision.recomputed": "recomputed a revision",
  "concession.ended": "turned an expired concession into held",
} as const;

export type ActivityEvent = keyof typeof activityEvents;

export type ActivitySubject =
  | "session"
  | "member"
  | "invitation"
  | "site"
  | "plan"
  | "drawing"
  | "screening"
  | "notice"
  | "delivery"
  | "revision";
