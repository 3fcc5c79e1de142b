import {
  boolean,
  foreignKey,
  index,
  int,
  mysqlTable,
  primaryKey,
  unique,
  varchar,
} from "drizzle-orm/mysql-core";
import type { Role } from "~/domain/roles";
import { code, exactText, id, instant, label, sha256Hex } from "../columns";

export const organisations = mysqlTable("organisations", {
  id: id("id").primaryKey(),
  slug: code("slug", { length: 64 }).notNull().unique(),
  name: label("name").notNull(),
  createdAt: instant("created_at").notNull(),
});

export const users = mysqlTable(
  "users",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id")
      .notNull()
      .references(() => organisations.id),
    name: label("name").notNull(),
    /** Where mail for this person goes; never an identity. Lower case. */
    email: varchar("email", { length: 254 }).notNull(),
    createdAt: instant("created_at").notNull(),
    /** When they stopped being a member: they cannot sign in, and what they did keeps their name. */
    removedAt: instant("removed_at"),
    /** When name and address of a former member were overwritten. */
    erasedAt: instant("erased_at"),
  },
  (t) => [
    unique("users_email").on(t.organisationId, t.email),
    unique("users_in_organisation").on(t.organisationId, t.id),
  ],
);

/** Who a sign-in provider says somebody is: (organisation, issuer, subject). */
export const identities = mysqlTable(
  "identities",
  {
    organisationId: id("organisation_id").notNull(),
    issuer: code("issuer", { length: 255 }).notNull(),
    subject: code("subject", { length: 255 }).notNull(),
    userId: id("user_id").notNull(),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.organisationId, t.issuer, t.subject] }),
    foreignKey({
      name: "identities_user",
      columns: [t.organisationId, t.userId],
      foreignColumns: [users.organisationId, users.id],
    }).onDelete("cascade"),
  ],
);

export const memberships = mysqlTable(
  "memberships",
  {
    organisationId: id("organisation_id").notNull(),
    userId: id("user_id").notNull(),
    role: code("role", { length: 16 }).$type<Role>().notNull(),
    grantedAt: instant("granted_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.userId, t.role] }),
    foreignKey({
      name: "memberships_user",
      columns: [t.organisationId, t.userId],
      foreignColumns: [users.organisationId, users.id],
    }).onDelete("cascade"),
  ],
);

/** A signed-in browser. The id is the hash of the token that the cookie holds. */
export const sessions = mysqlTable(
  "sessions",
  {
    id: sha256Hex("id").primaryKey(),
    userId: id("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    createdAt: instant("created_at").notNull(),
    lastSeenAt: instant("last_seen_at").notNull(),
    expiresAt: instant("expires_at").notNull(),
    /** When the person last proved who they are. */
    authenticatedAt: instant("authenticated_at").notNull(),
  },
  (t) => [index("sessions_user").on(t.userId), index("sessions_expiry").on(t.expiresAt)],
);

/** A sign-in on its way to the provider and back, bound to a cookie whose hash is the id. */
export const pendingSignIns = mysqlTable(
  "pending_sign_ins",
  {
    id: sha256Hex("id").primaryKey(),
    organisationId: id("organisation_id").references(() => organisations.id, { onDelete: "cascade" }),
    state: code("state", { length: 128 }).notNull(),
    nonce: code("nonce", { length: 128 }).notNull(),
    codeVerifier: code("code_verifier", { length: 128 }).notNull(),
    returnTo: varchar("return_to", { length: 512 }).notNull(),
    /** Who the provider vouched for, while that person still has to say for which organisation; null before. */
    subject: code("subject", { length: 255 }),
    /** Hash of the invitation's token, where somebody is about to accept one through the provider. */
    invitationLinkId: sha256Hex("invitation_link_id"),
    /** When the provider says that the subject proved who they are; null before, and where it does not say. */
    authenticatedAt: instant("authenticated_at"),
    /** Whether the person has to prove anew who they are, whatever session they have at the provider. */
    wantsFresh: boolean("wants_fresh").notNull().default(false),
    expiresAt: instant("expires_at").notNull(),
  },
  (t) => [index("pending_sign_ins_expiry").on(t.expiresAt)],
);

/** One-time sign-in links sent by e-mail, kept as hashes. */
export const signInLinks = mysqlTable(
  "sign_in_links",
  {
    id: sha256Hex("id").primaryKey(),
    userId: id("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    createdAt: instant("created_at").notNull(),
    expiresAt: instant("expires_at").notNull(),
    usedAt: instant("used_at"),
  },
  (t) => [index("sign_in_links_expiry").on(t.expiresAt)],
);

/** Attempts counted in a window, shared by all processes. The key holds a hash where it would hold an address. */
export const rateLimits = mysqlTable(
  "rate_limits",
  {
    bucket: code("bucket", { length: 128 }).notNull(),
    windowStartedAt: instant("window_started_at").notNull(),
    attempts: int("attempts").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.bucket, t.windowStartedAt] }),
    index("rate_limits_window").on(t.windowStartedAt),
  ],
);

/**
 * The newest line of each organisation's activity log; whoever adds a line holds this row until the end of their
 * transaction, so that the lines follow each other strictly. Made with the organisation.
 */
export const activityHeads = mysqlTable("activity_heads", {
  organisationId: id("organisation_id")
    .primaryKey()
    .references(() => organisations.id),
  /** 0 before the first line. */
  sequence: int("sequence").notNull(),
  hash: sha256Hex("hash").notNull(),
});

/** Who did what, when, as one hash chain for each organisation. Append-only: the application's database user may not change or remove a row. */
export const activityLog = mysqlTable(
  "activity_log",
  {
    id: id("id").primaryKey(),
    // Not to the organisation itself: checking that key would wait for whoever changes its members, who waits for the head.
    organisationId: id("organisation_id")
      .notNull()
      .references(() => activityHeads.organisationId),
    /** 1, 2, 3 … in each organisation, without a gap. */
    sequence: int("sequence").notNull(),
    at: instant("at").notNull(),
    /** Null when the service itself acted. No foreign key: the log outlives people. */
    actorId: id("actor_id"),
    event: code("event", { length: 64 }).notNull(),
    subjectKind: code("subject_kind", { length: 32 }).notNull(),
    subjectId: id("subject_id"),
    /** JSON of what changed. */
    detail: exactText("detail").notNull(),
    /** Of the line before; 64 zeros before the first. */
    previousHash: sha256Hex("previous_hash").notNull(),
    /** SHA-256 over the canonical JSON of all fields above but the id. */
    hash: sha256Hex("hash").notNull(),
  },
  (t) => [
    unique("activity_log_sequence").on(t.organisationId, t.sequence),
    index("activity_log_time").on(t.organisationId, t.at),
  ],
);
