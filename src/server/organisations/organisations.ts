import { chainStart } from "../activity/chain";
import type { Queryable } from "../db/client";
import { insertHead } from "../db/queries/activity";
import { insertOrganisation } from "../db/queries/organisations";

/** A short name for addresses: `Quillhaven Instruments` becomes `quillhaven-instruments`. */
export const slugOf = (name: string): string =>
  name
    .normalize("NFKD")
    .toLowerCase()
    .replace(/\p{M}/gu, "")
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-+|-+$/g, "")
    .slice(0, 64)
    .replace(/-+$/, "");

/** @returns the organisation's id */
export async function createOrganisation(tx: Queryable, name: string): Promise<string> {
  const slug = slugOf(name);
  if (slug === "") throw new Error("The organisation's name needs a letter a–z or a digit.");
  const id = crypto.randomUUID();
  await insertOrganisation(tx, { id, slug, name, createdAt: new Date() });
  await insertHead(tx, id, chainStart);
  return id;
}
