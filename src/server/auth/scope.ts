import { z } from "zod";
import { Refusal } from "~/domain/errors";
import { maySeeSite, type Member } from "~/domain/permissions";
import { db } from "../db/client";
import { findDelivery } from "../db/queries/deliveries";
import { findDrawing } from "../db/queries/drawings";
import { findInvitation } from "../db/queries/invitations";
import { findNotice } from "../db/queries/notices";
import { findFormerMember, findMember } from "../db/queries/people";
import { findArchivedPlan, findPlan } from "../db/queries/plans";
import { findRevision } from "../db/queries/revisions";
import { findScreening } from "../db/queries/screenings";
import { findArchivedSite, findContact, findSite } from "../db/queries/sites";

type Found<F extends (...args: never[]) => Promise<unknown>> = NonNullable<Awaited<ReturnType<F>>>;

/** The rows that a path's parameters name. */
export interface Scope {
  site?: Found<typeof findSite>;
  plan?: Found<typeof findPlan>;
  contact?: Found<typeof findContact>;
  drawing?: Found<typeof findDrawing>;
  screening?: Found<typeof findScreening>;
  notice?: Found<typeof findNotice>;
  revision?: Found<typeof findRevision>;
  person?: Found<typeof findMember>;
  formerMember?: Found<typeof findFormerMember>;
  invitation?: Found<typeof findInvitation>;
  delivery?: Found<typeof findDelivery>;
  archivedSite?: Found<typeof findArchivedSite>;
  archivedPlan?: Found<typeof findArchivedPlan>;
}

const uuid = z.uuid();

const notThere = () =>
  new Refusal(
    "not-found",
    "There is nothing at this address, or it is not yours to see. Go back to your Desk.",
  );

function found<T>(row: T | undefined): T {
  if (row === undefined) throw notThere();
  return row;
}

/**
 * Finds what a path names, from the outside in: a child under the wrong parent, another organisation's object, another
 * site's object and a malformed id are all the same to the caller.
 * @throws Refusal not-found
 */
export async function resolveScope(member: Member, params: Partial<Record<string, string>>): Promise<Scope> {
  const scope: Scope = {};
  const organisationId = member.organisationId;
  const id = (name: string): string => {
    const parsed = uuid.safeParse(params[name]);
    if (!parsed.success) throw notThere();
    return parsed.data;
  };
  if (params["siteId"] !== undefined) scope.site = found(await findSite(db(), organisationId, id("siteId")));
  if (params["planId"] !== undefined) {
    scope.plan = found(await findPlan(db(), organisationId, id("planId")));
    scope.site = found(await findSite(db(), organisationId, scope.plan.siteId));
  }
  if (scope.site && !maySeeSite(member, scope.site.id)) throw notThere();
  if (scope.site && params["contactId"] !== undefined)
    scope.contact = found(await findContact(db(), organisationId, scope.site.id, id("contactId")));
  if (scope.plan && params["drawingId"] !== undefined)
    scope.drawing = found(await findDrawing(db(), organisationId, scope.plan.id, id("drawingId")));
  if (scope.plan && params["screeningId"] !== undefined)
    scope.screening = found(await findScreening(db(), organisationId, scope.plan.id, id("screeningId")));
  if (scope.plan && params["noticeId"] !== undefined)
    scope.notice = found(await findNotice(db(), organisationId, scope.plan.id, id("noticeId")));
  if (scope.plan && params["revisionId"] !== undefined)
    scope.revision = found(await findRevision(db(), organisationId, scope.plan.id, id("revisionId")));
  if (params["userId"] !== undefined)
    scope.person = found(await findMember(db(), organisationId, id("userId")));
  if (params["formerId"] !== undefined)
    scope.formerMember = found(await findFormerMember(db(), organisationId, id("formerId")));
  if (params["invitationId"] !== undefined)
    scope.invitation = found(await findInvitation(db(), organisationId, id("invitationId")));
  if (params["deliveryId"] !== undefined)
    scope.delivery = found(await findDelivery(db(), organisationId, id("deliveryId")));
  if (params["archivedSiteId"] !== undefined)
    scope.archivedSite = found(await findArchivedSite(db(), organisationId, id("archivedSiteId")));
  if (params["archivedPlanId"] !== undefined)
    scope.archivedPlan = found(await findArchivedPlan(db(), organisationId, id("archivedPlanId")));
  return scope;
}

/** The part of a scope that a path must have named. @throws Error where an endpoint asks for what its path has not. */
export function named<K extends keyof Scope>(scope: Scope, key: K): NonNullable<Scope[K]> {
  const row = scope[key];
  if (row === undefined) throw new Error(`This address names no ${key}.`);
  return row;
}
