import request from "supertest";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { type Action, permissions } from "../../src/domain/permissions";
import { pageAction, pageActions } from "../../src/server/http/page-actions";
import { keptIds } from "../fixtures/kept";
import { endpointWalk, pageWalk } from "../fixtures/walk-table";
import {
  expectedOutcome,
  freshCookie,
  newContact,
  newKeptOf,
  type Objects,
  outcomeOf,
  startWalk,
  type Walker,
} from "../fixtures/walkers";
import { startTestApp, type TestApp } from "../support/test-app";

type Method = "get" | "post" | "put" | "patch" | "delete";

const methods = ["GET", "POST", "PUT", "PATCH", "DELETE"];
const addressOf = (file: string) =>
  file
    .replace(/^.*\/src\/pages/, "")
    .replace(/\.(ts|astro)$/, "")
    .replace(/\/index$/, "") || "/";
const partsOf = (address: string) => [...address.matchAll(/\[(\w+)\]/g)].map(([, part = ""]) => part);
const pathOf = (address: string, objects: Objects) =>
  address.replace(/\[(\w+)\]/g, (_, part: keyof Objects) => objects[part]);

/** What the endpoint files export, such as "GET /api/health" with its action; null where it states none. */
const endpoints = new Map<string, Action | null>();
const endpointFiles = import.meta.glob<Record<string, unknown>>("../../src/pages/api/**/*.ts", {
  eager: true,
});
for (const [file, exported] of Object.entries(endpointFiles))
  for (const [name, route] of Object.entries(exported))
    if (methods.includes(name) || typeof route === "function") {
      const { definition } = route as { definition?: { action: Action } };
      endpoints.set(`${name} ${addressOf(file)}`, definition?.action ?? null);
    }
// Files whose name starts with "_" are no pages.
const pages = Object.keys(import.meta.glob(["../../src/pages/**/*.astro", "!**/_*"])).map(addressOf);

let app: TestApp;
let walk: Awaited<ReturnType<typeof startWalk>>;
let asked = 0;

beforeAll(async () => {
  app = await startTestApp();
  walk = await startWalk();
});
afterAll(() => app.close());

async function ask(walker: Walker, method: Method, path: string, body?: Record<string, unknown>) {
  asked += 1;
  const client = request(app.server);
  const test = client[method](path)
    .set("Cookie", await freshCookie(walker))
    .set("Origin", app.origin)
    .set("X-Forwarded-For", `198.51.${String(asked >> 8)}.${String(asked & 255)}`);
  return method === "get" ? test : test.send(body ?? {});
}

/** Objects to name in `address`; those that a walk may have removed are new. */
async function objectsFor(address: string): Promise<Objects> {
  const { objects, planner, keeper } = walk;
  const kept = await newKeptOf(
    keeper,
    keptIds.filter((id) => address.includes(`[${id}]`)),
  );
  const contact = address.includes("[contactId]") && {
    contactId: await newContact(planner, objects.siteId),
  };
  return { ...objects, ...kept, ...contact };
}

describe("the walk's table", () => {
  it("has a row for every endpoint and no other", () => {
    expect([...endpoints.keys()].sort()).toEqual(Object.keys(endpointWalk).sort());
  });

  it("has a row for every page, each of which states its action, and no other", () => {
    expect([...pages].sort()).toEqual(Object.keys(pageWalk).sort());
    expect(Object.keys(pageActions).sort()).toEqual(pages.map((page) => page.toLowerCase()).sort());
  });

  it("says the same as the permission table", () => {
    const stated = Object.entries(endpointWalk).map(([endpoint, { by }]) => [endpoint, by]);
    const meant = [...endpoints].map(([endpoint, action]) => [endpoint, action && permissions[action].allow]);
    expect(Object.fromEntries(meant)).toEqual(Object.fromEntries(stated));
    for (const [page, by] of Object.entries(pageWalk)) {
      const action = pageAction(page);
      expect([page, action && permissions[action].allow]).toEqual([page, by]);
    }
  });
});

const endpointRows = Object.entries(endpointWalk).map(([endpoint, { by, body }]) => {
  const [name = "", address = ""] = endpoint.split(" ");
  const parts = partsOf(address) as (keyof Objects)[];
  return { title: endpoint, method: name.toLowerCase() as Method, address, parts, by, body };
});
/** Named in full, which vitest does for strings alone. */
const titled = <T extends { title: string }>(rows: readonly T[]) =>
  rows.map((row) => [row.title, row] as const);
const withObject = endpointRows.filter(({ parts }) => parts.length > 0);
const withParent = endpointRows.filter(({ parts }) => parts.length > 1);

describe("an endpoint", () => {
  it.each(titled(endpointRows))("%s lets through whom it must and nobody else", async (_, row) => {
    const found: Record<string, unknown> = {};
    const expected: Record<string, unknown> = {};
    for (const walker of walk.walkers) {
      const path = pathOf(row.address, await objectsFor(row.address));
      found[walker.name] = outcomeOf((await ask(walker, row.method, path, row.body)).status);
      expected[walker.name] = expectedOutcome(walker, row.by, row.parts);
    }
    expect(found).toEqual(expected);
  });

  it.each(titled(withObject))("%s answers for what is hidden as for what never was", async (_, row) => {
    const all = (value: () => string) =>
      Object.fromEntries(Object.keys(walk.objects).map((part) => [part, value()])) as Objects;
    const cannotSee = walk.walkers.filter(({ hidden }) => hidden.some((part) => row.parts.includes(part)));
    expect(cannotSee.length).toBeGreaterThan(0);
    for (const walker of cannotSee) {
      const answerFor = async (objects: Objects) =>
        (await ask(walker, row.method, pathOf(row.address, objects), row.body)).body as unknown;
      const hidden = await answerFor(walk.objects);
      expect(hidden).toMatchObject({ error: { code: "not-found" } });
      expect(await answerFor(all(() => crypto.randomUUID()))).toEqual(hidden);
      expect(await answerFor(all(() => "1"))).toEqual(hidden);
    }
  });

  it.each(titled(withParent))("%s finds no child under the wrong parent", async (_, row) => {
    const { objects, others } = walk;
    const mayUse = walk.walkers.filter((one) => expectedOutcome(one, row.by, row.parts) === "through");
    expect(mayUse.length).toBeGreaterThan(0);
    for (const part of row.parts)
      for (const walker of mayUse) {
        const mixed = pathOf(row.address, { ...objects, [part]: others[part] });
        const { status } = await ask(walker, row.method, mixed, row.body);
        expect([walker.name, part, status]).toEqual([walker.name, part, 404]);
      }
  });
});

const errorPages = ["/404", "/500"];
const pageRows = Object.entries(pageWalk)
  .filter(([page]) => !errorPages.includes(page))
  .map(([page, by]) => ({ title: page, by, parts: partsOf(page) as (keyof Objects)[] }));

describe("the page", () => {
  it.each(titled(pageRows))(
    "%s shows itself to whom it must and to nobody else",
    async (page, { by, parts }) => {
      const found: Record<string, unknown> = {};
      const expected: Record<string, unknown> = {};
      for (const walker of walk.walkers) {
        const path = pathOf(page, walk.objects);
        const { status, headers } = await ask(walker, "get", path);
        const outcome = expectedOutcome(walker, by, parts);
        const isSentToSignIn = headers["location"] === `/sign-in?returnTo=${encodeURIComponent(path)}`;
        found[walker.name] = isSentToSignIn ? 401 : status;
        expected[walker.name] = outcome === "through" ? 200 : outcome;
      }
      expect(found).toEqual(expected);
    },
  );

  const childPages = pageRows.filter(({ parts }) => parts.length > 1);
  it.each(titled(childPages))("%s is not there under the wrong parent", async (page, { by, parts }) => {
    const { objects, others, walkers } = walk;
    for (const walker of walkers.filter((one) => expectedOutcome(one, by, parts) === "through")) {
      const { status } = await ask(walker, "get", pathOf(page, { ...objects, planId: others.planId }));
      expect([walker.name, status]).toEqual([walker.name, 404]);
    }
  });
});
