import { createConnection } from "mysql2/promise";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { noticeView } from "../../src/server/notices/notices";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newAddress, newScreenedPlan, type ScreenedPlan } from "../fixtures/screenings";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let auditor: SignedInMember;
let stranger: SignedInMember;
let screened: ScreenedPlan;

beforeAll(async () => {
  app = await startTestApp();
  const organisation = await newOrganisation("Notice Office");
  planner = await newMember(organisation, ["planner"]);
  auditor = await newMember(organisation, ["auditor"]);
  stranger = await newMember(await newOrganisation("Foreign Office"), ["planner"]);
});
beforeEach(async () => {
  screened = await newScreenedPlan(planner);
});
afterAll(() => app.close());

const notices = () => `/api/plans/${screened.plan.id}/notices`;
const compose = (more: object = {}, member = planner) =>
  as(app, member)("post", notices()).send({
    screeningId: screened.screeningId,
    coveringText: "Keep dock 3 free.",
    recipients: [{ name: "Site team", email: newAddress() }],
    ...more,
  });
const deliveriesOf = async (id: string) =>
  (await as(app, planner)("get", `${notices()}/${id}/deliveries`)).body.deliveries;
const draftTag = async (id: string) => (await noticeView(planner, id)).draftTag;
const issue = (id: string, member = planner) => as(app, member)("post", `${notices()}/${id}/issue`);

describe("composing", () => {
  it("begins a draft that names each address once", async () => {
    const email = newAddress();
    const answer = await compose({
      recipients: [
        { name: "Ilka Thorsen", email },
        { name: "Somebody else", email: email.toUpperCase() },
      ],
    });
    expect(answer.status).toBe(201);
    expect(answer.body.url).toBe(`/plans/${screened.plan.id}/notices/${String(answer.body.id)}`);
    expect((await issue(answer.body.id)).body.recipients).toBe(1);
    expect(await deliveriesOf(answer.body.id)).toMatchObject([{ recipientName: "Ilka Thorsen", email }]);
  });

  it("leads to the draft that is there, and refuses a second one that would say something", async () => {
    const first = await compose();
    const again = await compose({ coveringText: "", recipients: [] });
    expect([again.status, again.body]).toEqual([200, first.body]);
    const second = await compose();
    expect([second.status, second.body.error.code]).toEqual([409, "state.conflict"]);
    expect(second.body.error.detail).toEqual(first.body);
  });

  it("begins one draft, however often it is asked for at the same time", async () => {
    const ask = () => compose({ coveringText: "", recipients: [] });
    const answers = await Promise.all([ask(), ask(), ask(), ask()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 200, 201]);
    expect(new Set(answers.map(({ body }) => body.id)).size).toBe(1);
  });

  it("refuses whatever would begin another header or another recipient", async () => {
    const refused: [object, string][] = [
      [{ name: "A\r\nBcc: all@site.example", email: "a@site.example" }, "recipients[0].name"],
      [{ name: "A\u2028B", email: "a@site.example" }, "recipients[0].name"],
      [{ name: "A", email: "a@site.example\r\nBcc: b@site.example" }, "recipients[0].email"],
      [{ name: "A", email: "a@site.example, b@site.example" }, "recipients[0].email"],
      [{ name: "A", email: "<a@site.example>" }, "recipients[0].email"],
      [{ name: "A", email: "a@site.example> NOTIFY=NEVER" }, "recipients[0].email"],
      [{ name: " ", email: "a@site.example" }, "recipients[0].name"],
    ];
    for (const [recipient, path] of refused) {
      const answer = await compose({ recipients: [recipient] });
      expect([answer.status, answer.body.error.faults[0].path]).toEqual([422, path]);
    }
    expect((await compose({ coveringText: "x".repeat(4001) })).status).toBe(422);
  });

  it("is for planners of the organisation and for screenings of the plan", async () => {
    expect((await compose({}, auditor)).status).toBe(403);
    expect((await compose({}, stranger)).status).toBe(404);
    const other = await newScreenedPlan(planner);
    expect((await compose({ screeningId: other.screeningId })).status).toBe(404);
  });
});

describe("a draft that two planners have open", () => {
  it("takes the first save, and refuses the second with what the first left, until it is meant", async () => {
    const { body } = await compose();
    const at = `${notices()}/${String(body.id)}`;
    const change = (draft: object) => as(app, planner)("patch", at).send(draft);
    const opened = await draftTag(body.id);
    const email = newAddress();
    const first = { coveringText: "Wear a helmet.", recipients: [{ name: "Ilka Thorsen", email }] };
    const saved = await change({ draftTag: opened, ...first });
    expect([saved.status, saved.body]).toEqual([200, { id: body.id, draftTag: await draftTag(body.id) }]);
    const late = await change({ draftTag: opened, coveringText: "No helmet." });
    expect([late.status, late.body.error.code]).toEqual([409, "state.conflict"]);
    expect(late.body.error.detail).toEqual({ draftTag: saved.body.draftTag, ...first });
    // A save whose answer was lost is sent again, on the old tag.
    expect((await change({ draftTag: opened, ...first })).status).toBe(200);
    const meant = await change({ draftTag: late.body.error.detail.draftTag, coveringText: "No helmet." });
    expect(meant.status).toBe(200);
    expect(await noticeView(planner, body.id)).toMatchObject({
      notice: { coveringText: "No helmet." },
      recipients: [{ email }],
    });
    expect((await change({ coveringText: "On nothing." })).status).toBe(422);
  });

  it("lets one of two simultaneous saves through", async () => {
    const { body } = await compose();
    const opened = await draftTag(body.id);
    const save = (coveringText: string) =>
      as(app, planner)("patch", `${notices()}/${String(body.id)}`).send({ draftTag: opened, coveringText });
    const answers = await Promise.all([save("One."), save("Two.")]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });
});

describe("the preview", () => {
  it("shows what will be sent, and may do nothing but be shown in a page of this application", async () => {
    const { body } = await compose({ coveringText: "<script>alert(1)</script>\nBring the long ladder." });
    const html = await as(app, auditor)("get", `${notices()}/${String(body.id)}/preview.html`);
    expect(html.status).toBe(200);
    expect(html.headers["content-type"]).toBe("text/html; charset=utf-8");
    expect(html.headers["content-security-policy"]).toBe(
      "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'self'; sandbox",
    );
    expect(html.text).toContain("Bring the long ladder.");
    expect(html.text).not.toContain("<script");
    expect(html.text).toContain(
      `href="${app.origin}/plans/${screened.plan.id}/screenings/${screened.screeningId}"`,
    );
    const text = await as(app, auditor)("get", `${notices()}/${String(body.id)}/preview.txt`);
    expect(text.headers["content-type"]).toBe("text/plain; charset=utf-8");
    expect(text.text).toContain("PRELIMINARY, NOT FOR MOUNTING");
    expect(text.text).toContain("<script>alert(1)</script>\nBring the long ladder.");
    expect((await as(app, stranger)("get", `${notices()}/${String(body.id)}/preview.txt`)).status).toBe(404);
  });

  it("follows the draft, and stays as it was once the notice is issued", async () => {
    const { body } = await compose();
    const at = `${notices()}/${String(body.id)}`;
    const changed = await as(app, planner)("patch", at).send({
      draftTag: await draftTag(body.id),
      coveringText: "Wear a helmet.",
    });
    expect(changed.status).toBe(200);
    const preview = async () => (await as(app, planner)("get", `${at}/preview.txt`)).text;
    const before = await preview();
    expect(before).toContain("Wear a helmet.");
    await issue(body.id);
    await as(app, planner)("patch", `/api/sites/${screened.plan.siteId}`).send({ name: "Another name" });
    expect(await preview()).toBe(before);
    const later = { draftTag: changed.body.draftTag, coveringText: "Later." };
    expect((await as(app, planner)("patch", at).send(later)).status).toBe(409);
  });
});

describe("issuing", () => {
  it("puts one message a recipient into the outbox, each with a Message-ID of its own, and says so", async () => {
    const recipients = ["A", "B", "C"].map((name) => ({ name, email: newAddress() }));
    const { body } = await compose({ recipients });
    const issued = await issue(body.id);
    expect([issued.status, issued.body.recipients]).toEqual([200, 3]);
    const rows = await deliveriesOf(body.id);
    expect(rows).toMatchObject(
      recipients.map(({ name, email }) => ({ recipientName: name, email, state: "waiting", attempts: 0 })),
    );
    const [line] = await listActivity(db(), planner.organisationId, 1);
    expect(line).toMatchObject({ event: "notice.issued", subjectId: body.id, actorName: planner.name });
    expect(line?.detail).not.toContain("@");
  });

  it("happens once, however often it is asked for at the same time", async () => {
    const { body } = await compose();
    const answers = await Promise.all([issue(body.id), issue(body.id), issue(body.id)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    expect(await deliveriesOf(body.id)).toHaveLength(1);
  });

  it("needs somebody to go to", async () => {
    const { body } = await compose({ recipients: [] });
    const refused = await issue(body.id);
    expect([refused.status, refused.body.error.faults[0].path]).toEqual([422, "recipients"]);
  });

  it("is for planners", async () => {
    const { body } = await compose();
    expect((await issue(body.id, auditor)).status).toBe(403);
    expect((await issue(body.id, stranger)).status).toBe(404);
  });

  it("lets a new version be written afterwards", async () => {
    const first = await compose();
    await issue(first.body.id);
    const second = await compose();
    expect([second.status, second.body.id === first.body.id]).toEqual([201, false]);
    const text = await as(app, planner)("get", `${notices()}/${String(second.body.id)}/preview.txt`);
    expect(text.text).toContain("version 2, sent by");
  });

  it("leaves the draft as it was when the outbox cannot be written", async () => {
    const { body } = await compose();
    const owner = await createConnection(app.database.ownerUrl);
    try {
      await owner.query(
        "create trigger no_outbox before insert on deliveries for each row signal sqlstate '45000' set message_text = 'full'",
      );
      expect((await issue(body.id)).status).toBe(500);
      await owner.query("drop trigger no_outbox");
    } finally {
      await owner.end();
    }
    expect(await deliveriesOf(body.id)).toEqual([]);
    expect((await issue(body.id)).status).toBe(200);
  });
});
