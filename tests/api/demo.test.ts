import { env as variables } from "node:process";
import { afterAll, beforeAll, expect, it } from "vitest";
import { seedDemo } from "../../scripts/services/app";
import type { Member } from "../../src/domain/permissions";
import { db } from "../../src/server/db/client";
import { findByEmail, rolesOf, siteIdsOf } from "../../src/server/db/queries/people";
import { deskFor } from "../../src/server/desk/desk";
import { siteOverview } from "../../src/server/sites/sites";
import { startTestApp, type TestApp } from "../support/test-app";

// Each seeding is a process of its own that compiles the sources first.
const seedingMs = 90_000;

let app: TestApp;

beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.close());

const environment = () =>
  Object.fromEntries(
    Object.entries(variables).flatMap(([name, value]) => (value === undefined ? [] : [[name, value]])),
  );

async function memberBy(email: string): Promise<Member> {
  const [found] = await findByEmail(db(), email);
  if (found === undefined) throw new Error(`The demo has nobody with the address ${email}.`);
  const { userId, organisationId } = found;
  const [roles, siteIds] = [await rolesOf(db(), userId), await siteIdsOf(db(), userId)];
  return { kind: "member", userId, organisationId, name: email, roles, siteIds };
}

it(
  "makes organisations that do not see each other, and a plan with verdicts for the first sign-in",
  async () => {
    expect(await seedDemo(environment())).toMatchObject({ status: 0, stderr: "" });

    const planner = await memberBy("maren.oakshott@quillhaven.example");
    const desk = await deskFor(planner);
    expect(desk.sites).toMatchObject([
      {
        name: "Quillhaven works, north range",
        plans: [
          {
            name: "Level 1, instrument hall",
            verdict: "over",
            flaggedCount: 5,
            changedSinceScreening: false,
          },
        ],
      },
    ]);
    const overview = await siteOverview(planner, desk.sites[0]?.id ?? "");
    expect(overview.contacts.map(({ name }) => name)).toEqual([
      "Anselm Korb",
      "Ilka Brandvold",
      "Site office",
    ]);
    expect(overview.earthField?.model).toBe("WMM2025");
    expect(overview.earthField?.horizontalT).toBeCloseTo(17.95e-6, 7);

    const installer = await memberBy("ilka.brandvold@quillhaven.example");
    expect((await deskFor(installer)).sites).toMatchObject([{ id: overview.site.id, plans: [] }]);
    const stranger = await memberBy("dagny.ravnkilde@ostwick.example");
    expect((await deskFor(stranger)).sites.map(({ name }) => name)).toEqual(["Ostwick observatory hut"]);
    await expect(siteOverview(stranger, overview.site.id)).rejects.toMatchObject({ code: "not-found" });
  },
  seedingMs,
);

it(
  "is not made twice, and never where the services are real",
  async () => {
    const again = await seedDemo(environment());
    expect(again.status).toBe(1);
    expect(again.stderr).toMatch(/already/);
    const real = await seedDemo({ ...environment(), LOCAL_FAKES: "0" });
    expect(real.status).toBe(1);
    expect(real.stderr).toMatch(/fakes/);
  },
  seedingMs,
);
