import { eq } from "drizzle-orm";
import { afterAll, beforeAll, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { findOrganisationBySlug } from "../../src/server/db/queries/organisations";
import { findByIdentity, rolesOf } from "../../src/server/db/queries/people";
import { organisations, users } from "../../src/server/db/schema/people";
import { foundOrganisation } from "../../src/server/organisations/found";
import { organisationView } from "../../src/server/organisations/view";
import { newMember, newOrganisation } from "../fixtures/organisation";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;

beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.close());

it("an organisation is founded with an admin whom the provider knows", async () => {
  const identity = { issuer: "https://login.example", subject: "ada" };
  const admin = { name: "Ada Quist", email: "Ada@Farnwick.example", identity };
  const { organisationId } = await foundOrganisation("Farnwick Signals", admin);
  expect(await findOrganisationBySlug(db(), "farnwick-signals")).toMatchObject({ id: organisationId });
  const [known] = await findByIdentity(db(), identity.issuer, identity.subject);
  expect(known?.organisationId).toBe(organisationId);
  expect(await rolesOf(db(), known?.userId ?? "")).toEqual(["admin"]);
});

it("neither organisation nor admin is there when one of them cannot be", async () => {
  const admin = { name: "Bea Lund", email: "bea@taken.example" };
  await foundOrganisation("Taken Name", admin);
  await expect(foundOrganisation("taken  name!", { ...admin, email: "bea@second.example" })).rejects.toThrow(
    'There is an organisation by the name "taken  name!"',
  );
  expect(await db().select().from(users).where(eq(users.email, "bea@second.example"))).toEqual([]);
  await expect(foundOrganisation("Half Done", { ...admin, name: "x".repeat(300) })).rejects.toThrow();
  expect(await db().select().from(organisations).where(eq(organisations.slug, "half-done"))).toEqual([]);
});

it("the organisation's page shows its own people with their roles, and its own activity", async () => {
  const organisation = await newOrganisation("Viewed Office");
  const admin = await newMember(organisation, ["admin", "planner"]);
  const auditor = await newMember(organisation, ["auditor"]);
  await newMember(await newOrganisation("Unseen Office"), ["planner"]);
  const view = await organisationView(admin);
  expect(view.organisation).toMatchObject({
    id: organisation.id,
    name: "Viewed Office",
    slug: "viewed-office",
  });
  const seen = view.members.map(({ userId, roles }) => [userId, [...roles].sort()]);
  expect(Object.fromEntries(seen)).toEqual({
    [admin.userId]: ["admin", "planner"],
    [auditor.userId]: ["auditor"],
  });
  expect(view.head.sequence).toBe(2);
});
