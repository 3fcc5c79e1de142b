import { foreignKey, index, int, mysqlTable, unique, varchar } from "drizzle-orm/mysql-core";
import type { DeliveryKind, DeliveryState } from "~/domain/delivery";
import type { NoticeKind, NoticeState } from "~/domain/notice";
import { code, exactText, id, instant, label } from "../columns";
import { invitations } from "./invitations";
import { organisations, users } from "./people";
import { screenings } from "./plans";
import { revisionMails } from "./revisions";

/** What a site's people are told after a screening. Versions of one screening's notice count up from 1. */
export const notices = mysqlTable(
  "notices",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    screeningId: id("screening_id").notNull(),
    kind: code("kind", { length: 16 }).$type<NoticeKind>().notNull(),
    version: int("version").notNull(),
    state: code("state", { length: 16 }).$type<NoticeState>().notNull(),
    /** Plain text of the planner. */
    coveringText: exactText("covering_text").notNull(),
    createdBy: id("created_by").references(() => users.id),
    createdAt: instant("created_at").notNull(),
    issuedAt: instant("issued_at"),
  },
  (t) => [
    unique("notices_version").on(t.screeningId, t.kind, t.version),
    foreignKey({
      name: "notices_screening",
      columns: [t.organisationId, t.screeningId],
      foreignColumns: [screenings.organisationId, screenings.id],
    }),
  ],
);

/** What an issued notice says, to the byte: each recipient gets the same, and later changes of names do not reach it. */
export const noticeMessages = mysqlTable("notice_messages", {
  noticeId: id("notice_id")
    .primaryKey()
    .references(() => notices.id, { onDelete: "cascade" }),
  subject: label("subject", 300).notNull(),
  html: exactText("html").notNull(),
  text: exactText("text").notNull(),
  /** The attached file, its byte order mark included. */
  positionsCsv: exactText("positions_csv").notNull(),
  csvFileName: label("csv_file_name").notNull(),
  replyToName: label("reply_to_name").notNull(),
  replyToEmail: varchar("reply_to_email", { length: 254 }).notNull(),
});

/** Who a notice goes to, as they stood in the site's list when it was composed. */
export const noticeRecipients = mysqlTable(
  "notice_recipients",
  {
    id: id("id").primaryKey(),
    noticeId: id("notice_id")
      .notNull()
      .references(() => notices.id, { onDelete: "cascade" }),
    name: label("name").notNull(),
    email: varchar("email", { length: 254 }).notNull(),
  },
  (t) => [unique("notice_recipients_email").on(t.noticeId, t.email)],
);

/**
 * The outbox: one row for each message, written in the transaction of what it tells of and claimed by the delivery
 * worker. A notice's message names its recipient and one about a revision its stored text; a sign-in message names the
 * person and an invitation's message the invitation: their tokens are made when they are sent.
 */
export const deliveries = mysqlTable(
  "deliveries",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id")
      .notNull()
      .references(() => organisations.id),
    kind: code("kind", { length: 16 }).$type<DeliveryKind>().notNull(),
    recipientId: id("recipient_id")
      .unique()
      .references(() => noticeRecipients.id, { onDelete: "cascade" }),
    userId: id("user_id").references(() => users.id, { onDelete: "cascade" }),
    invitationId: id("invitation_id").references(() => invitations.id, { onDelete: "cascade" }),
    revisionMailId: id("revision_mail_id")
      .unique()
      .references(() => revisionMails.id, { onDelete: "cascade" }),
    messageId: code("message_id", { length: 128 }).notNull().unique(),
    state: code("state", { length: 16 }).$type<DeliveryState>().notNull(),
    attempts: int("attempts").notNull(),
    nextAttemptAt: instant("next_attempt_at").notNull(),
    /** Until when the worker that claimed the row may be at work on it. */
    claimedUntil: instant("claimed_until"),
    /** The mail server's last answer, without addresses. */
    lastAnswer: varchar("last_answer", { length: 500 }),
    createdAt: instant("created_at").notNull(),
    sentAt: instant("sent_at"),
  },
  (t) => [
    index("deliveries_due").on(t.state, t.nextAttemptAt),
    index("deliveries_organisation").on(t.organisationId, t.createdAt),
  ],
);
