import type { Action } from "~/domain/permissions";

/** What each page needs; a page that is not listed is refused by the middleware. */
export const pageActions: Readonly<Record<string, Action>> = {
  "/": "front.read",
  "/404": "front.read",
  "/500": "front.read",
  "/sign-in": "session.start",
  "/sign-in/link": "session.start",
  "/sign-in/organisation": "session.start",
  "/desk": "desk.read",
  "/catalogue": "catalogue.read",
  "/account": "account.read",
  "/organisation": "organisation.read",
  "/organisation/deliveries": "delivery.read",
  "/organisation/activity": "activity.read",
  "/organisation/archive": "organisation.read",
  "/invitations/accept": "invitation.accept",
  "/invitations/confirm": "invitation.accept",
  "/sites/new": "site.create",
  "/sites/[siteid]": "site.read",
  "/plans/[planid]": "plan.read",
  "/plans/[planid]/screenings/[screeningid]": "screening.read",
  "/plans/[planid]/notices/[noticeid]": "notice.read",
  "/plans/[planid]/revisions": "revision.read",
  "/plans/[planid]/revisions/[revisionid]": "revision.read",
};

/** The action of a route pattern, whatever case the router gives the parameters in. */
export const pageAction = (routePattern: string): Action | undefined =>
  pageActions[routePattern === "/" ? "/" : routePattern.replace(/\/$/, "").toLowerCase()];
