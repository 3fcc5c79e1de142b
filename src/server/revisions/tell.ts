import { revisionLetters, type RevisionMailAbout } from "~/domain/revision";
import type { Queryable } from "../db/client";
import { insertDeliveries } from "../db/queries/deliveries";
import { listDecisions } from "../db/queries/decisions";
import { listMembers } from "../db/queries/people";
import type { PlanRow } from "../db/queries/plans";
import { insertRevisionMails, listRevisionComments, type RevisionRow } from "../db/queries/revisions";
import { env } from "../env";
import { type RevisionMail, revisionMail } from "../mail/revision-mail";
import { newMessageId } from "../mail/message-id";
import { revisionPage } from "./open-revision";

type Revision = Pick<RevisionRow, "id" | "organisationId" | "planId" | "ordinal" | "submittedBy">;

export interface Addressee {
  name: string;
  email: string;
}

type Told = Omit<RevisionMail, "greeting" | "url" | "open">;

/** Puts one message for each addressee into the outbox; call it in the transaction of what it tells of. */
export async function tell(
  tx: Queryable,
  revision: Pick<Revision, "id" | "organisationId" | "planId">,
  about: RevisionMailAbout,
  addressees: readonly Addressee[],
  told: Told,
): Promise<void> {
  const now = new Date();
  const mails = addressees.map(({ name, email }) => ({
    id: crypto.randomUUID(),
    revisionId: revision.id,
    about,
    toName: name,
    toEmail: email,
    ...revisionMail({
      ...told,
      greeting: `Hello ${name},`,
      url: env().appOrigin + revisionPage(revision),
      open: "Open the revision",
    }),
  }));
  await insertRevisionMails(tx, mails);
  await insertDeliveries(
    tx,
    mails.map(({ id: revisionMailId }) => ({
      id: crypto.randomUUID(),
      organisationId: revision.organisationId,
      kind: "revision" as const,
      revisionMailId,
      messageId: newMessageId(),
      state: "waiting" as const,
      attempts: 0,
      nextAttemptAt: now,
      createdAt: now,
    })),
  );
}

/** Some people of the organisation by their ids, each once; whoever has left is passed over. */
export async function peopleBy(
  tx: Queryable,
  organisationId: string,
  userIds: readonly (string | null)[],
): Promise<Addressee[]> {
  const wanted = new Set(userIds);
  return (await listMembers(tx, organisationId)).filter(({ userId }) => wanted.has(userId));
}

export const called = (plan: Pick<PlanRow, "name">, { ordinal }: Pick<Revision, "ordinal">): string =>
  `revision ${revisionLetters(ordinal)} of ${plan.name}`;

/** Tells every auditor who may decide on it: whoever drew or submitted it may not. */
export async function tellOfSubmission(
  tx: Queryable,
  plan: PlanRow,
  revision: Revision & { note: string },
  editors: readonly { userId: string }[],
): Promise<void> {
  const own = new Set([revision.submittedBy, ...editors.map(({ userId }) => userId)]);
  const auditors = (await listMembers(tx, revision.organisationId)).filter(
    ({ userId, roles }) => roles.includes("auditor") && !own.has(userId),
  );
  await tell(tx, revision, "submitted", auditors, {
    subject: `For review: ${called(plan, revision)}`,
    sentences: [
      `${called(plan, revision)} waits for review. Its flagged positions need your decisions before it can be released.`.replace(
        /^r/,
        "R",
      ),
    ],
    ...(revision.note !== "" && { quoted: { heading: "Note of the planner", text: revision.note } }),
  });
}

/** The auditors who have taken part in a review; all who may, as long as nobody has. */
export async function reviewersOf(
  tx: Queryable,
  revision: Revision,
  editors: readonly { userId: string }[],
): Promise<string[]> {
  const own = new Set([revision.submittedBy, ...editors.map(({ userId }) => userId)]);
  const auditors = (await listMembers(tx, revision.organisationId))
    .filter(({ userId, roles }) => roles.includes("auditor") && !own.has(userId))
    .map(({ userId }) => userId);
  const active = new Set([
    ...(await listDecisions(tx, revision.id)).map(({ decidedBy }) => decidedBy),
    ...(await listRevisionComments(tx, revision.id)).map(({ authorId }) => authorId),
  ]);
  const takingPart = auditors.filter((userId) => active.has(userId));
  return takingPart.length > 0 ? takingPart : auditors;
}
