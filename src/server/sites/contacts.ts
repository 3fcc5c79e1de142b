import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { isDuplicateEntry } from "../db/duplicate-entry";
import { deleteContact, insertContact, type SiteContactRow, type SiteRow } from "../db/queries/sites";
import type { ContactInput } from "./site-input";

/** @throws Refusal input.refused where the address is already in the site's list */
export async function addContact(
  member: Member,
  site: SiteRow,
  input: ContactInput,
): Promise<{ id: string }> {
  const id = crypto.randomUUID();
  const { organisationId, userId: actorId } = member;
  try {
    await db().transaction(async (tx) => {
      await insertContact(tx, { ...input, id, organisationId, siteId: site.id, createdAt: new Date() });
      await recordActivity(tx, {
        organisationId,
        actorId,
        event: "contact.added",
        subjectKind: "site",
        subjectId: site.id,
        detail: { contactId: id, duty: input.duty },
      });
    });
  } catch (error) {
    if (!isDuplicateEntry(error, "site_contacts_email")) throw error;
    const message = "This address is already in the list of people to notify. Remove that entry first.";
    throw new Refusal("input.refused", message, { faults: [{ path: "email", message }], cause: error });
  }
  return { id };
}

export async function removeContact(member: Member, contact: SiteContactRow): Promise<void> {
  const { organisationId, userId: actorId } = member;
  await db().transaction(async (tx) => {
    await deleteContact(tx, organisationId, contact.siteId, contact.id);
    await recordActivity(tx, {
      organisationId,
      actorId,
      event: "contact.removed",
      subjectKind: "site",
      subjectId: contact.siteId,
      detail: { contactId: contact.id, duty: contact.duty },
    });
  });
}
