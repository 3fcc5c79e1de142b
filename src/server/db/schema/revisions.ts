import {
  date,
  double,
  foreignKey,
  index,
  int,
  mysqlTable,
  primaryKey,
  unique,
  varchar,
} from "drizzle-orm/mysql-core";
import type { DecisionKind } from "~/domain/decision";
import type { RevisionMailAbout, RevisionState } from "~/domain/revision";
import type { Verdict } from "~/domain/screening-result";
import { code, documentKey, exactText, id, instant, label, sha256Hex } from "../columns";
import { users } from "./people";
import { plans, screenings } from "./plans";

/** Who has saved a plan's working copy since its last release, and up to which version. */
export const planEditors = mysqlTable(
  "plan_editors",
  {
    organisationId: id("organisation_id").notNull(),
    planId: id("plan_id").notNull(),
    userId: id("user_id").notNull(),
    lastVersion: int("last_version").notNull(),
    lastEditedAt: instant("last_edited_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.planId, t.userId] }),
    foreignKey({
      name: "plan_editors_plan",
      columns: [t.organisationId, t.planId],
      foreignColumns: [plans.organisationId, plans.id],
    }).onDelete("cascade"),
    foreignKey({
      name: "plan_editors_user",
      columns: [t.organisationId, t.userId],
      foreignColumns: [users.organisationId, users.id],
    }).onDelete("cascade"),
  ],
);

/** A submitted state of a plan. What it froze stands in `revision_contents`; here is what happens to it. */
export const revisions = mysqlTable(
  "revisions",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    planId: id("plan_id").notNull(),
    /** 1 is A. */
    ordinal: int("ordinal").notNull(),
    state: code("state", { length: 16 }).$type<RevisionState>().notNull(),
    /** The plan's id while under review, otherwise null: one revision of a plan at a time. */
    underReviewOf: id("under_review_of"),
    /** What the planner says of it. Plain text. */
    note: exactText("note").notNull(),
    submittedBy: id("submitted_by").references(() => users.id),
    submittedAt: instant("submitted_at").notNull(),
    /** Who released or returned it. */
    closedBy: id("closed_by").references(() => users.id),
    closedAt: instant("closed_at"),
    /** The sentence that was signed on release, and the name under it as it was typed. */
    signedSentence: exactText("signed_sentence"),
    signedName: label("signed_name"),
    /** Why it was returned. */
    returnReasons: exactText("return_reasons"),
    supersededAt: instant("superseded_at"),
  },
  (t) => [
    unique("revisions_ordinal").on(t.planId, t.ordinal),
    unique("revisions_under_review").on(t.underReviewOf),
    unique("revisions_in_organisation").on(t.organisationId, t.id),
    index("revisions_state").on(t.organisationId, t.state),
    foreignKey({
      name: "revisions_plan",
      columns: [t.organisationId, t.planId],
      foreignColumns: [plans.organisationId, plans.id],
    }),
  ],
);

/** What a revision froze. The application's database user may not change or remove a row. */
export const revisionContents = mysqlTable("revision_contents", {
  revisionId: id("revision_id")
    .primaryKey()
    .references(() => revisions.id, { onDelete: "cascade" }),
  screeningId: id("screening_id")
    .notNull()
    .references(() => screenings.id),
  documentVersion: int("document_version").notNull(),
  document: exactText("document").notNull(),
  documentSha256: sha256Hex("document_sha256").notNull(),
  /** Null for a plan on a blank grid. */
  drawingId: id("drawing_id"),
  drawingSha256: sha256Hex("drawing_sha256"),
  result: exactText("result").notNull(),
  resultSha256: sha256Hex("result_sha256").notNull(),
  inputHash: code("input_hash", { length: 80 }).notNull(),
  engineVersion: code("engine_version", { length: 32 }).notNull(),
  verdict: code("verdict", { length: 16 }).$type<Verdict>().notNull(),
  /** SHA-256 over the hashes of document, drawing and result and the engine's version. */
  sealSha256: sha256Hex("seal_sha256").notNull(),
});

/** Whose edits a revision holds; none of them may release it. */
export const revisionEditors = mysqlTable(
  "revision_editors",
  {
    revisionId: id("revision_id")
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    userId: id("user_id")
      .notNull()
      .references(() => users.id),
    lastEditedAt: instant("last_edited_at").notNull(),
  },
  (t) => [primaryKey({ columns: [t.revisionId, t.userId] })],
);

/** The positions of a revision with their verdicts, so that lists need not open results. */
export const revisionPositions = mysqlTable(
  "revision_positions",
  {
    revisionId: id("revision_id")
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    sensorId: documentKey("sensor_id").notNull(),
    sensorName: label("sensor_name", 300).notNull(),
    verdict: code("verdict", { length: 16 }).$type<Verdict>().notNull(),
    /** Of the finding that makes the verdict. */
    budgetUsed: double("budget_used").notNull(),
  },
  (t) => [primaryKey({ columns: [t.revisionId, t.sensorId] })],
);

/** What was decided on a flagged position. Append-only; the highest ordinal of a position stands. */
export const decisions = mysqlTable(
  "decisions",
  {
    revisionId: id("revision_id")
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    sensorId: documentKey("sensor_id").notNull(),
    ordinal: int("ordinal").notNull(),
    kind: code("kind", { length: 16 }).$type<DecisionKind>().notNull(),
    reason: exactText("reason").notNull(),
    /** Last day of a concession, on the site's calendar; null where it does not expire. */
    expiresOn: date("expires_on", { mode: "string" }),
    /** Where a position that is not released should go; null where nothing was suggested. */
    moveTo: exactText("move_to"),
    /** Null when the service itself turned an expired concession into held. */
    decidedBy: id("decided_by").references(() => users.id),
    decidedAt: instant("decided_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.revisionId, t.sensorId, t.ordinal] }),
    index("decisions_expiry").on(t.expiresOn),
  ],
);

/** What was said about a position under review. Append-only. */
export const revisionComments = mysqlTable(
  "revision_comments",
  {
    id: id("id").primaryKey(),
    revisionId: id("revision_id")
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    sensorId: documentKey("sensor_id").notNull(),
    text: exactText("text").notNull(),
    authorId: id("author_id").references(() => users.id),
    writtenAt: instant("written_at").notNull(),
  },
  (t) => [index("revision_comments_position").on(t.revisionId, t.sensorId, t.writtenAt)],
);

/** That somebody was told of a concession's end, so many days before. */
export const concessionReminders = mysqlTable(
  "concession_reminders",
  {
    revisionId: id("revision_id")
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    sensorId: documentKey("sensor_id").notNull(),
    decisionOrdinal: int("decision_ordinal").notNull(),
    daysBefore: int("days_before").notNull(),
    toldAt: instant("told_at").notNull(),
  },
  (t) => [
    primaryKey({
      name: "concession_reminders_pk",
      columns: [t.revisionId, t.sensorId, t.decisionOrdinal, t.daysBefore],
    }),
  ],
);

/** A message about a revision, composed when it happened; its outbox row points here. */
export const revisionMails = mysqlTable(
  "revision_mails",
  {
    id: id("id").primaryKey(),
    revisionId: id("revision_id")
      .notNull()
      .references(() => revisions.id, { onDelete: "cascade" }),
    about: code("about", { length: 32 }).$type<RevisionMailAbout>().notNull(),
    toName: label("to_name").notNull(),
    toEmail: varchar("to_email", { length: 254 }).notNull(),
    subject: label("subject", 500).notNull(),
    html: exactText("html").notNull(),
    text: exactText("text").notNull(),
  },
  (t) => [index("revision_mails_revision").on(t.revisionId)],
);
