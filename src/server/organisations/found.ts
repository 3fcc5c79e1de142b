import { db } from "../db/client";
import { isDuplicateEntry } from "../db/duplicate-entry";
import { createMember, type NewMember } from "./members";
import { createOrganisation } from "./organisations";

type FirstAdmin = Pick<NewMember, "name" | "email" | "identity">;

/**
 * Creates an organisation with its first admin, both or neither.
 * @throws Error when the name is taken
 */
export async function foundOrganisation(
  name: string,
  admin: FirstAdmin,
): Promise<{ organisationId: string }> {
  try {
    return await db().transaction(async (tx) => {
      const organisationId = await createOrganisation(tx, name);
      await createMember(tx, { ...admin, organisationId, roles: ["admin"] });
      return { organisationId };
    });
  } catch (cause) {
    if (!isDuplicateEntry(cause, "organisations_slug_unique")) throw cause;
    throw new Error(`There is an organisation by the name "${name}", or one nearly alike, already.`, {
      cause,
    });
  }
}
