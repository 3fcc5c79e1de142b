import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Recipient } from "../../src/domain/notice";
import { requestSignInMail } from "../../src/server/auth/sign-in-links";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import {
  claimDueDelivery,
  listNoticeDeliveries,
  settleDelivery,
} from "../../src/server/db/queries/deliveries";
import { deliverNext } from "../../src/server/deliveries/deliver";
import { messageOf } from "../../src/server/deliveries/message";
import { runDeliveryWorker } from "../../src/server/deliveries/worker";
import { type MailTransport, openMailTransport } from "../../src/server/mail/transport";
import { issueNotice } from "../../src/server/notices/issue";
import { messageOfNotice } from "../../src/server/notices/render";
import { createMember } from "../../src/server/organisations/members";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newAddress, newDraft, newScreenedPlan } from "../fixtures/screenings";
import { mailsTo } from "../support/mailbox";
import { services } from "../support/services";
import { startTestApp, type TestApp } from "../support/test-app";

const minuteMs = 60_000;

let app: TestApp;
let planner: SignedInMember;
let transport: MailTransport;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Delivery Office"), ["planner"]);
  transport = openMailTransport();
});
afterAll(async () => {
  transport.close();
  await app.close();
});

async function issued(recipients: Recipient[], coveringText = "Keep dock 3 free.") {
  const screened = await newScreenedPlan(planner);
  const notice = await newDraft(planner, screened, recipients, coveringText);
  await issueNotice(planner, screened.plan, notice);
  return { ...screened, notice, states: () => listNoticeDeliveries(db(), planner.organisationId, notice.id) };
}

/** Sends whatever is due at that moment. */
async function drain(now = new Date()): Promise<void> {
  while (await deliverNext(transport, () => now));
}

const later = (ms: number) => new Date(Date.now() + ms);

describe("a notice in the mailbox", () => {
  it("is one message a recipient, in both forms, with the positions attached, answered to the planner", async () => {
    const recipients = [
      { name: 'Søren "Sunny" Ødegård, site lead; <night>', email: newAddress() },
      { name: "梅田 花子", email: newAddress() },
    ];
    const { notice, plan, states } = await issued(recipients);
    await drain();
    const expected = await messageOfNotice(db(), planner, plan, notice);
    for (const { name, email } of recipients) {
      const mails = await mailsTo(services(), email);
      expect(mails).toHaveLength(1);
      const [mail] = mails;
      expect(mail?.recipients).toEqual([email]);
      expect(mail?.to).toContain(name.replaceAll('"', '\\"').slice(0, 5));
      expect(mail?.to).toContain(email);
      expect(mail?.subject).toBe(expected.subject);
      expect(mail?.text.trim()).toBe(expected.text.trim());
      expect(mail?.html.trim()).toBe(expected.html.trim());
      expect(mail?.replyTo).toContain(planner.name);
      expect(mail?.headers["auto-submitted"]).toContain("auto-generated");
      expect(mail?.attachments.map(({ filename, contentType }) => [filename, contentType])).toEqual([
        [expected.csvFileName, "text/csv"],
      ]);
      const csv = Buffer.from(mail?.attachments[0]?.contentBase64 ?? "", "base64").toString("utf8");
      expect(csv).toBe(expected.positionsCsv);
      expect(csv).toContain('"\'=SUM(A1) Bcc: all@quillhaven.example"'.slice(1, -1));
    }
    expect(await states()).toMatchObject(
      recipients.map(() => ({ state: "sent", attempts: 1, lastAnswer: expect.stringContaining("250") })),
    );
    const [line] = await listActivity(db(), planner.organisationId, 1);
    expect(line).toMatchObject({ event: "delivery.sent", actorName: null });
  });
});

describe("a refusal", () => {
  it("that passes is waited out and tried again under the same Message-ID", async () => {
    const email = newAddress("refuse-once");
    const { states } = await issued([{ name: "Site team", email }]);
    await drain();
    const [put] = await states();
    expect(put).toMatchObject({ state: "waiting", attempts: 1 });
    expect(put?.lastAnswer).toMatch(/^451 .*\(address\)/);
    const waitMs = (put?.nextAttemptAt.getTime() ?? 0) - Date.now();
    expect(waitMs).toBeGreaterThan(30_000);
    expect(waitMs).toBeLessThanOrEqual(minuteMs);
    await drain();
    expect(await states()).toMatchObject([{ attempts: 1 }]);
    await drain(later(2 * minuteMs));
    expect(await states()).toMatchObject([{ state: "sent", attempts: 2 }]);
    expect(await mailsTo(services(), email)).toHaveLength(1);
  });

  it("for good fails at once, is shown and recorded, and holds nobody else up", async () => {
    const good = newAddress();
    const { states } = await issued([
      { name: "A", email: newAddress("refuse") },
      { name: "B", email: good },
    ]);
    await drain();
    expect(await states()).toMatchObject([
      { state: "failed", attempts: 1, lastAnswer: expect.stringMatching(/^550 /) },
      { state: "sent" },
    ]);
    await mailsTo(services(), good);
    const lines = await listActivity(db(), planner.organisationId, 2);
    expect(lines.map(({ event }) => event).sort()).toEqual(["delivery.failed", "delivery.sent"]);
  });

  it("again and again ends in failure after the last wait", async () => {
    const { states } = await issued([{ name: "A", email: newAddress("refuse-temporarily") }]);
    let at = new Date();
    for (let attempt = 1; attempt <= 7; attempt += 1) {
      await drain(at);
      at = new Date(at.getTime() + 13 * 60 * minuteMs);
    }
    expect(await states()).toMatchObject([{ state: "failed", attempts: 7 }]);
  });
});

describe("several workers", () => {
  it("send each message once", async () => {
    const recipients = Array.from({ length: 24 }, (_, index) => ({
      name: `Person ${String(index)}`,
      email: newAddress(),
    }));
    const { states } = await issued(recipients);
    await Promise.all(Array.from({ length: 4 }, () => drain()));
    expect((await states()).map(({ state, attempts }) => [state, attempts])).toEqual(
      recipients.map(() => ["sent", 1]),
    );
    for (const { email } of recipients) expect(await mailsTo(services(), email)).toHaveLength(1);
  });

  it("leave a claimed message alone until the claim runs out, then send it under the same Message-ID", async () => {
    const email = newAddress();
    const { states } = await issued([{ name: "A", email }]);
    const now = new Date();
    const dead = await db().transaction((tx) =>
      claimDueDelivery(tx, now, new Date(now.getTime() + minuteMs)),
    );
    if (dead === undefined) throw new Error("Nothing was due.");
    const message = await messageOf(dead, now);
    if (message === undefined) throw new Error("The message is not there.");
    await transport.send(message);
    await drain();
    expect(await states()).toMatchObject([{ state: "waiting", attempts: 1 }]);
    await drain(later(2 * minuteMs));
    expect(await states()).toMatchObject([{ state: "sent", attempts: 2 }]);
    const mails = await mailsTo(services(), email, { count: 2 });
    expect(new Set(mails.map(({ messageId }) => messageId))).toEqual(new Set([`<${dead.messageId}>`]));
    expect(await settleDelivery(db(), dead, { state: "failed", lastAnswer: "too late" })).toBe(false);
    expect(await states()).toMatchObject([{ state: "sent" }]);
  });
});

describe("the worker", () => {
  it("sends sign-in mail with a link that was made for it", async () => {
    const email = newAddress("person");
    await db().transaction((tx) =>
      createMember(tx, {
        organisationId: planner.organisationId,
        name: "Nora Lindqvist",
        email,
        roles: ["installer"],
        siteIds: [],
      }),
    );
    await requestSignInMail(email);
    await drain();
    const [mail] = await mailsTo(services(), email);
    expect(mail?.subject).toBe("Your link to sign in to Stillneedle");
    expect(mail?.text).toMatch(/\/sign-in\/link\?token=\S{20,}/);
    expect(mail?.text).toContain("for 10 minutes");
    expect(mail?.html).toContain(/http\S+/.exec(mail?.text ?? "")?.[0]);
  });

  it("picks up what is issued while it runs, and stops when it is told to", async () => {
    const stop = new AbortController();
    const work = runDeliveryWorker({ signal: stop.signal });
    const email = newAddress();
    await issued([{ name: "A", email }]);
    await mailsTo(services(), email);
    stop.abort();
    await work;
  });
});
