import { foreignKey, index, mysqlTable, primaryKey, unique, varchar } from "drizzle-orm/mysql-core";
import { code, id, instant, label, sha256Hex } from "../columns";
import { users } from "./people";
import { sites } from "./plans";

/** Somebody asked to become a member, with what they will be. Accepted once, or withdrawn. */
export const invitations = mysqlTable(
  "invitations",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    name: label("name").notNull(),
    /** Where the invitation goes. Lower case. */
    email: varchar("email", { length: 254 }).notNull(),
    /** Their roles, with commas between. */
    roles: code("roles", { length: 64 }).notNull(),
    invitedBy: id("invited_by").notNull(),
    createdAt: instant("created_at").notNull(),
    acceptedAt: instant("accepted_at"),
    withdrawnAt: instant("withdrawn_at"),
  },
  (t) => [
    unique("invitations_in_organisation").on(t.organisationId, t.id),
    index("invitations_email").on(t.organisationId, t.email),
    foreignKey({
      name: "invitations_inviter",
      columns: [t.organisationId, t.invitedBy],
      foreignColumns: [users.organisationId, users.id],
    }),
  ],
);

/** Sites that the person invited will see. */
export const invitationSites = mysqlTable(
  "invitation_sites",
  {
    organisationId: id("organisation_id").notNull(),
    invitationId: id("invitation_id").notNull(),
    siteId: id("site_id").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.invitationId, t.siteId] }),
    foreignKey({
      name: "invitation_sites_invitation",
      columns: [t.organisationId, t.invitationId],
      foreignColumns: [invitations.organisationId, invitations.id],
    }).onDelete("cascade"),
    foreignKey({
      name: "invitation_sites_site",
      columns: [t.organisationId, t.siteId],
      foreignColumns: [sites.organisationId, sites.id],
    }).onDelete("cascade"),
  ],
);

/** Links sent for an invitation, kept as hashes; each attempt to send makes one. */
export const invitationLinks = mysqlTable(
  "invitation_links",
  {
    id: sha256Hex("id").primaryKey(),
    invitationId: id("invitation_id")
      .notNull()
      .references(() => invitations.id, { onDelete: "cascade" }),
    createdAt: instant("created_at").notNull(),
    expiresAt: instant("expires_at").notNull(),
  },
  (t) => [index("invitation_links_expiry").on(t.expiresAt)],
);
