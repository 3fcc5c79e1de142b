import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { findDelivery } from "../../src/server/db/queries/deliveries";
import { findDrawing, listDrawings } from "../../src/server/db/queries/drawings";
import { findInvitation } from "../../src/server/db/queries/invitations";
import { findScreening } from "../../src/server/db/queries/screenings";
import { storeDrawing } from "../../src/server/drawings/drawings";
import { mintInvitationLink } from "../../src/server/invitations/links";
import { purgeByRetention } from "../../src/server/retention/purge";
import { sweepStrayObjects } from "../../src/server/retention/stray-objects";
import { listObjectKeys, putObject } from "../../src/server/storage/objects";
import { as } from "../fixtures/api-client";
import { floorPicture } from "../fixtures/images";
import { newInvitation, newKept } from "../fixtures/kept";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newDraft, newScreenedPlan } from "../fixtures/screenings";
import { startTestApp, type TestApp } from "../support/test-app";

const dayMs = 24 * 60 * 60_000;
const inDays = (days: number) => new Date(Date.now() + days * dayMs);

let app: TestApp;
let member: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
  member = await newMember(await newOrganisation("Keeping Office"), ["planner", "admin"]);
});
afterAll(() => app.close());

const screenAgain = async (planId: string) =>
  (
    (await as(app, member)("post", `/api/plans/${planId}/screenings`).send({ version: 1 })).body as {
      id: string;
    }
  ).id;

describe("the purge", () => {
  it("forgets old screenings unless they are the latest or a notice was made from them", async () => {
    const { organisationId } = member;
    const bare = await newScreenedPlan(member);
    const told = await newScreenedPlan(member);
    await newDraft(member, told, []);
    const latest = await screenAgain(bare.plan.id);
    await screenAgain(told.plan.id);
    const isThere = async (planId: string, id: string) =>
      (await findScreening(db(), organisationId, planId, id)) !== undefined;
    const left = async () => [
      await isThere(bare.plan.id, bare.screeningId),
      await isThere(bare.plan.id, latest),
      await isThere(told.plan.id, told.screeningId),
    ];
    await purgeByRetention(inDays(89));
    expect(await left()).toEqual([true, true, true]);
    await purgeByRetention(inDays(91));
    expect(await left()).toEqual([false, true, true]);
  });

  it("forgets drawings that nothing shows, then their objects, and no others", async () => {
    const { plan } = await newScreenedPlan(member);
    const bytes = await floorPicture(60, 40).png().toBuffer();
    const { id } = await storeDrawing(member, plan, { bytes, fileName: "unused.png" });
    const row = await findDrawing(db(), member.organisationId, plan.id, id);
    const isStored = async () => (await listObjectKeys("drawings/")).includes(row?.storageKey ?? "");
    await purgeByRetention(inDays(29));
    expect([await isStored(), (await listDrawings(db(), member.organisationId, plan.id)).length]).toEqual([
      true,
      1,
    ]);
    await purgeByRetention(inDays(31));
    expect(await listDrawings(db(), member.organisationId, plan.id)).toEqual([]);
    expect(await isStored()).toBe(false);
  });

  it("removes objects without a row, but none that was stored within the last day", async () => {
    const key = `drawings/${crypto.randomUUID()}`;
    await putObject(key, new Uint8Array([1]), "image/png");
    await sweepStrayObjects(inDays(-1));
    expect(await listObjectKeys(key)).toEqual([key]);
    await sweepStrayObjects(inDays(1));
    expect(await listObjectKeys(key)).toEqual([]);
  });

  it("forgets invitations that ended or lapsed long ago", async () => {
    const open = await newInvitation(member);
    await mintInvitationLink(db(), open, inDays(88));
    const lapsed = await newInvitation(member);
    await purgeByRetention(inDays(91));
    const left = [open, lapsed].map((id) => findInvitation(db(), member.organisationId, id));
    expect((await Promise.all(left)).map((row) => row !== undefined)).toEqual([true, false]);
  });
});

describe("a delivery by hand", () => {
  it("is given up, then tried again at once", async () => {
    // The purges above have ended the sessions from before.
    const admin = await newMember(await newOrganisation("Sending Office"), ["admin"]);
    const id = await newKept.deliveryId(admin);
    const path = `/api/organisation/deliveries/${id}`;
    const state = async () => (await findDelivery(db(), admin.organisationId, id))?.state;
    expect((await as(app, admin)("post", `${path}/give-up`).send({})).status).toBe(204);
    expect(await state()).toBe("failed");
    expect((await as(app, admin)("post", `${path}/give-up`).send({})).status).toBe(409);
    expect((await as(app, admin)("post", `${path}/try-again`).send({})).status).toBe(204);
    expect(await state()).toBe("waiting");
    const page = async (query: string) =>
      (await as(app, admin)("get", `/organisation/deliveries${query}`)).text;
    expect(await page("?kind=invitation&state=waiting&to=Nora")).toContain("Try again now");
    expect(await page("?state=sent")).toContain("No message matches");
  });
});
