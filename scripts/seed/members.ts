import type { Member } from "../../src/domain/permissions";
import { db } from "../../src/server/db/client";
import { env } from "../../src/server/env";
import { createMember } from "../../src/server/organisations/members";
import { demoPeople } from "./demo-people";

/**
 * Adds one of the demo's people to their organisation.
 * @returns them as the services know a signed-in member
 */
export async function addPerson(
  organisationId: string,
  subject: string,
  siteIds: readonly string[] = [],
): Promise<Member> {
  const person = demoPeople.find((each) => each.subject === subject);
  if (person === undefined) throw new Error(`The demo has nobody called ${subject}.`);
  const { name, email, roles } = person;
  const identity = { issuer: env().oidc.issuer, subject };
  const userId = await db().transaction((tx) =>
    createMember(tx, { organisationId, name, email, roles, siteIds, identity }),
  );
  return { kind: "member", userId, organisationId, name, roles, siteIds };
}
