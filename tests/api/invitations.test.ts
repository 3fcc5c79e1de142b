import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { InvitationState } from "../../src/domain/invitation";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import {
  findByIdentity,
  findMemberByEmail,
  findUser,
  rolesOf,
  siteIdsOf,
} from "../../src/server/db/queries/people";
import { invitationLinks } from "../../src/server/db/schema/invitations";
import { deliverNext } from "../../src/server/deliveries/deliver";
import { env } from "../../src/server/env";
import { invitationsOf } from "../../src/server/invitations/invite";
import { mintInvitationLink } from "../../src/server/invitations/links";
import { type MailTransport, openMailTransport } from "../../src/server/mail/transport";
import { removeMember } from "../../src/server/organisations/removal";
import { as } from "../fixtures/api-client";
import { newInvitation } from "../fixtures/kept";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newAddress } from "../fixtures/screenings";
import { newSite } from "../fixtures/sites";
import { mailsTo } from "../support/mailbox";
import { services } from "../support/services";
import { signIn } from "../support/sign-in";
import { startTestApp, type TestApp } from "../support/test-app";
import type { Visitor } from "../support/visitor";

const dayMs = 24 * 60 * 60_000;
let app: TestApp;
let transport: MailTransport;
let admin: SignedInMember;
let organisation: { id: string; name: string };

beforeAll(async () => {
  app = await startTestApp();
  transport = openMailTransport();
});
beforeEach(async () => {
  organisation = await newOrganisation(`Inviting Office ${crypto.randomUUID()}`);
  admin = await newMember(organisation, ["admin"]);
});
afterAll(async () => {
  transport.close();
  await app.close();
});

const post = (body: Record<string, unknown>) =>
  as(app, admin)("post", "/api/organisation/invitations").send({
    name: "Nora Lindqvist",
    roles: ["planner"],
    ...body,
  });
async function drain(): Promise<void> {
  while (await deliverNext(transport));
}
const tokenOf = (url: string) => new URL(url).searchParams.get("token") ?? "";
const accept = (token: string, visitor: Visitor = app.visitor()) =>
  visitor.request(`${app.origin}/api/invitations/accept`, {
    method: "POST",
    body: new URLSearchParams({ token }),
  });
const goesTo = (response: Response) => response.headers.get("location");
const problem = (name: string) => `/invitations/accept?problem=${name}`;
const states = async (now = new Date()): Promise<InvitationState[]> =>
  (await invitationsOf(admin, now)).map(({ state }) => state);
const linkOf = async (email: string) => {
  await drain();
  const [mail] = await mailsTo(services(), email);
  return /http\S+\/invitations\/accept\?token=[\w-]{43}/.exec(mail?.text ?? "")?.[0] ?? "";
};

describe("an invitation", () => {
  it("goes out by mail, changes nothing by being opened, and makes the member when its button is pressed", async () => {
    const email = newAddress();
    const site = await newSite(admin);
    const made = await post({ email: email.toUpperCase(), roles: ["installer"], siteIds: [site.id] });
    expect(made.status).toBe(201);
    expect(await states()).toEqual(["waiting"]);
    const link = await linkOf(email);
    expect(await states()).toEqual(["open"]);
    const links = await db().select().from(invitationLinks);
    expect(JSON.stringify(links)).not.toContain(tokenOf(link));

    for (let scans = 0; scans < 2; scans += 1) {
      const opened = await app.visitor().request(link);
      expect([opened.status, opened.headers.getSetCookie()]).toEqual([200, []]);
    }
    expect(await findMemberByEmail(db(), organisation.id, email)).toBeUndefined();

    const visitor = app.visitor();
    const page = await (await visitor.request(link)).text();
    expect(page).toContain(organisation.name);
    const accepted = await accept(/name="token" value="([\w-]+)"/.exec(page)?.[1] ?? "", visitor);
    expect(goesTo(accepted)).toBe("/desk");
    expect((await visitor.request(`${app.origin}/desk`)).status).toBe(200);
    const person = await findMemberByEmail(db(), organisation.id, email);
    expect(await rolesOf(db(), person?.id ?? "")).toEqual(["installer"]);
    expect(await siteIdsOf(db(), person?.id ?? "")).toEqual([site.id]);
    expect(await states()).toEqual(["accepted"]);
    const lines = await listActivity(db(), organisation.id, 4);
    expect(lines.map(({ event }) => event)).toContain("invitation.accepted");
    expect(goesTo(await accept(tokenOf(link)))).toBe(problem("accepted"));
  });

  it("is accepted once when several press at the same time", async () => {
    const id = await newInvitation(admin);
    const tokens = await Promise.all(
      [1, 2, 3, 4].map(async () => tokenOf((await mintInvitationLink(db(), id)).url)),
    );
    const answers = await Promise.all(tokens.map((token) => accept(token)));
    expect(answers.map(goesTo).sort()).toEqual(["/desk", ...[1, 2, 3].map(() => problem("accepted"))]);
  });

  it("lapses after seven days, and works again when it is sent again", async () => {
    const email = newAddress();
    const id = await newInvitation(admin, email);
    const old = tokenOf((await mintInvitationLink(db(), id, new Date(Date.now() - 7 * dayMs))).url);
    expect(goesTo(await accept(old))).toBe(problem("lapsed"));
    await drain();
    expect(await states(new Date(Date.now() + 8 * dayMs))).toEqual(["lapsed"]);
    const again = await as(app, admin)("post", `/api/organisation/invitations/${id}/send-again`).send({});
    expect(again.status).toBe(204);
    await drain();
    const [newest] = await mailsTo(services(), email, { count: 2 });
    const link = /http\S+token=[\w-]{43}/.exec(newest?.text ?? "")?.[0] ?? "";
    expect(goesTo(await accept(tokenOf(link)))).toBe("/desk");
  });

  it("is useless once withdrawn, and can neither be withdrawn nor sent again then", async () => {
    const id = await newInvitation(admin);
    const { url } = await mintInvitationLink(db(), id);
    const path = `/api/organisation/invitations/${id}`;
    expect((await as(app, admin)("delete", path)).status).toBe(204);
    expect(goesTo(await accept(tokenOf(url)))).toBe(problem("withdrawn"));
    expect((await as(app, admin)("delete", path)).status).toBe(409);
    expect((await as(app, admin)("post", `${path}/send-again`).send({})).status).toBe(409);
    expect(await states()).toEqual(["withdrawn"]);
  });

  it("is refused for an address that is a member's or has an invitation, and for another organisation's site", async () => {
    const email = newAddress();
    await newInvitation(admin, email);
    const own = await findUser(db(), admin.userId);
    const strangers = await newMember(await newOrganisation(`Far ${crypto.randomUUID()}`), ["admin"]);
    const site = await newSite(strangers);
    for (const body of [
      { email },
      { email: own?.email },
      { email: newAddress(), siteIds: [site.id] },
      { email: "nobody" },
    ]) {
      const answer = await post(body);
      expect([answer.status, answer.body.error.code]).toEqual([422, "input.refused"]);
    }
  });

  it("makes nobody auditor by their own hand", async () => {
    const id = await newInvitation(admin);
    const { url } = await mintInvitationLink(db(), id);
    const answer = await as(app, admin)("post", "/api/invitations/accept").send({ token: tokenOf(url) });
    expect(answer.headers["location"]).toBe(problem("signed-in-as-member"));
    expect(await states()).toEqual(["waiting"]);
  });

  it("is limited in number", async () => {
    const id = await newInvitation(admin);
    const again = () => as(app, admin)("post", `/api/organisation/invitations/${id}/send-again`).send({});
    const answers = [await again(), await again(), await again(), await again()];
    expect(answers.map(({ status }) => status)).toEqual([204, 204, 204, 429]);
  });

  it("brings a former member back under the id that their work carries", async () => {
    const email = newAddress();
    const first = await newInvitation(admin, email);
    await accept(tokenOf((await mintInvitationLink(db(), first)).url));
    const before = await findMemberByEmail(db(), organisation.id, email);
    await removeMember(admin, { id: before?.id ?? "" });
    const second = await newInvitation(admin, email);
    await accept(tokenOf((await mintInvitationLink(db(), second)).url));
    const after = await findMemberByEmail(db(), organisation.id, email);
    expect(after).toMatchObject({ id: before?.id, removedAt: null });
    expect(await rolesOf(db(), before?.id ?? "")).toEqual(["planner"]);
  });
});

describe("accepting through single sign-on", () => {
  it("binds the identity when the button is pressed after the provider has vouched, and not before", async () => {
    const id = await newInvitation(admin);
    const token = tokenOf((await mintInvitationLink(db(), id)).url);
    const visitor = app.visitor();
    const start = `/api/sign-in/start?${new URLSearchParams({ invitation: token }).toString()}`;
    const { url, response } = await signIn(visitor, app.origin, "no.member", start);
    expect([url.pathname, response.status]).toEqual(["/invitations/confirm", 200]);
    expect(await states()).toEqual(["waiting"]);
    const confirm = () =>
      visitor.request(`${app.origin}/api/invitations/confirm`, {
        method: "POST",
        body: new URLSearchParams(),
      });
    expect(goesTo(await confirm())).toBe("/desk");
    const known = await findByIdentity(db(), env().oidc.issuer, "no.member");
    expect(known.map(({ organisationId }) => organisationId)).toEqual([organisation.id]);
    expect(goesTo(await confirm())).toBe(problem("expired"));

    // Somebody whom the organisation knows already does not become a second person.
    const other = tokenOf((await mintInvitationLink(db(), await newInvitation(admin))).url);
    const twice = app.visitor();
    await signIn(
      twice,
      app.origin,
      "no.member",
      `/api/sign-in/start?${new URLSearchParams({ invitation: other }).toString()}`,
    );
    const answer = await twice.request(`${app.origin}/api/invitations/confirm`, {
      method: "POST",
      body: new URLSearchParams(),
    });
    expect(goesTo(answer)).toBe(problem("identity-taken"));
    expect(await states()).toEqual(["waiting", "accepted"]);
  });
});
