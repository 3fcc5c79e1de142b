import request from "supertest";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { listContacts, type SiteRow } from "../../src/server/db/queries/sites";
import { addContact } from "../../src/server/sites/contacts";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newSite } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let site: SiteRow;
let contactId: string;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Origin Office"), ["planner"]);
  site = await newSite(planner);
  ({ id: contactId } = await addContact(planner, site, {
    name: "Site office",
    email: "office@site.example",
    duty: "Site manager",
  }));
});
afterAll(() => app.close());

const contacts = () => listContacts(db(), site.organisationId, site.id);
const removal = (origin?: string) => {
  const test = request(app.server)
    .delete(`/api/sites/${site.id}/contacts/${contactId}`)
    .set("Cookie", planner.cookie);
  return origin === undefined ? test : test.set("Origin", origin);
};
const foreign = () => [
  "https://elsewhere.example",
  "null",
  "",
  app.origin.replace("http:", "https:"),
  app.origin.replace(/\d$/, ""),
  `${app.origin}0`,
  `${app.origin}.elsewhere.example`,
  `${app.origin}/`,
  app.origin.replace("127.0.0.1", "localhost"),
  `https://elsewhere.example, ${app.origin}`,
];

describe("an unsafe request from another origin", () => {
  it("is refused when it has no body at all", async () => {
    for (const origin of [undefined, ...foreign()]) {
      const answer = await removal(origin);
      expect([origin, answer.status, answer.body.error.code]).toEqual([
        origin,
        403,
        "request.foreign-origin",
      ]);
    }
    expect(await contacts()).toHaveLength(1);
  });

  it.each([
    ["application/json", "{}"],
    ["application/x-www-form-urlencoded", "a=b"],
    ["text/plain", "{}"],
    ["multipart/form-data; boundary=x", "--x--"],
    ["application/octet-stream", "x"],
  ])("is refused with a body of %s", async (mediaType, body) => {
    for (const method of ["post", "put", "patch"] as const) {
      const test = request(app.server)[method](`/api/sites/${site.id}`);
      const answer = await test
        .set("Cookie", planner.cookie)
        .set("Origin", "https://elsewhere.example")
        .set("Content-Type", mediaType)
        .send(body);
      expect([method, answer.status, answer.body.error.code]).toEqual([
        method,
        403,
        "request.foreign-origin",
      ]);
    }
  });

  it("is refused before anybody is signed in or out", async () => {
    for (const path of [
      "/api/sign-out",
      "/api/sign-in/token",
      "/api/sign-in/link",
      "/api/account/sign-out-everywhere",
    ]) {
      const answer = await request(app.server)
        .post(path)
        .set("Cookie", planner.cookie)
        .type("form")
        .send("token=x");
      expect([path, answer.status]).toEqual([path, 403]);
      expect(answer.headers["set-cookie"]).toBeUndefined();
    }
  });

  it("is refused on a page with a page that says so", async () => {
    const answer = await request(app.server)
      .post("/desk")
      .set("Cookie", planner.cookie)
      .set("Origin", "https://elsewhere.example")
      .set("Accept", "text/html");
    expect(answer.status).toBe(403);
    expect(answer.text).toContain("did not come from a page of this application");
    expect(answer.headers).toMatchObject({ "x-content-type-options": "nosniff", "x-frame-options": "DENY" });
  });
});

it("lets a safe request through whatever its origin", async () => {
  const answer = await request(app.server).get("/api/health").set("Origin", "https://elsewhere.example");
  expect([answer.status, answer.body]).toEqual([200, { status: "ok" }]);
});

it("lets this application's own unsafe request through", async () => {
  expect((await removal(app.origin)).status).toBe(204);
  expect(await contacts()).toEqual([]);
});

it("answers an endpoint that is not there, or not by that method, in JSON", async () => {
  for (const path of ["/api/nothing", "/api/health"]) {
    const answer = await request(app.server).post(path).set("Origin", app.origin);
    expect([path, answer.status, answer.body.error?.code]).toEqual([path, 404, "not-found"]);
  }
});
