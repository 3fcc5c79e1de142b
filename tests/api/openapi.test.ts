import request from "supertest";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import * as z from "zod";
import { statusByErrorCode, type ErrorCode } from "../../src/domain/errors";
import { releaseSentence } from "../../src/domain/revision";
import { roles } from "../../src/domain/roles";
import { planDocumentSchema } from "../../src/domain/plan-document/plan-document";
import { db } from "../../src/server/db/client";
import { findNoticeById } from "../../src/server/db/queries/notices";
import { findSite } from "../../src/server/db/queries/sites";
import { draftTagOf } from "../../src/server/notices/draft-tag";
import { storeDrawing } from "../../src/server/drawings/drawings";
import { freezeRevision } from "../../src/server/revisions/submit";
import { as } from "../fixtures/api-client";
import { floorPicture } from "../fixtures/images";
import { awkwardPlan, awkwardResult, parsed } from "../fixtures/judged-plan";
import type { Caller } from "../fixtures/openapi/call";
import { documentedCalls } from "../fixtures/openapi/calls";
import {
  judgeOf,
  type OpenApi,
  openApiStructure,
  type Operation,
  operationsOf,
  referencesIn,
} from "../fixtures/openapi/document";
import { keptIds } from "../fixtures/kept";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newDraft, newScreenedPlan } from "../fixtures/screenings";
import { newContact, newKeptOf } from "../fixtures/walkers";
import { endpointWalk } from "../fixtures/walk-table";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let document: OpenApi;
let operations: Map<string, Operation>;
let caller: Caller;
let everyRole: SignedInMember;

const published = async (path: string) =>
  (await request(app.server).get(path)).body as Record<string, unknown>;

beforeAll(async () => {
  app = await startTestApp();
  document = (await published("/api/openapi.json")) as OpenApi;
  operations = operationsOf(document);
  caller = await newCaller();
  everyRole = await newMember(await newOrganisation("Refused Office"), roles);
});
afterAll(() => app.close());

async function newCaller(): Promise<Caller> {
  const organisation = await newOrganisation("Described Office");
  const member = await newMember(organisation, ["planner", "admin"]);
  const screened = await newScreenedPlan(member);
  const { plan, screeningId } = screened;
  const bytes = await floorPicture(60, 40).png().toBuffer();
  const drawing = await storeDrawing(member, plan, { bytes, fileName: "floor.png" });
  const { id: noticeId } = await newDraft(member, screened, []);
  const notice = await findNoticeById(db(), member.organisationId, noticeId);
  const fresh = await as(app, member)("post", `/api/plans/${plan.id}/screenings`).send({ version: 1 });
  const reviewed = await newScreenedPlan(member);
  const auditor = await newMember(organisation, ["auditor"]);
  const revision = await freezeRevision(member, reviewed.plan, reviewed.screeningId, "");
  const reviewedSite = await findSite(db(), member.organisationId, reviewed.plan.siteId);
  return {
    ids: {
      siteId: plan.siteId,
      planId: plan.id,
      drawingId: drawing.id,
      screeningId,
      freshScreeningId: (fresh.body as { id: string }).id,
      noticeId,
      noticeTag: draftTagOf(notice?.coveringText ?? "", []),
      contactId: await newContact(member, plan.siteId),
      ...(await newKeptOf(member, keptIds)),
      reviewed: {
        planId: reviewed.plan.id,
        revisionId: revision.id,
        sentence: releaseSentence({
          ordinal: 1,
          planName: reviewed.plan.name,
          siteName: reviewedSite?.name ?? "",
          dispositions: ["held", "held", "released"],
        }),
        auditorName: auditor.name,
      },
    },
    ask: as(app, member),
    askAsAuditor: as(app, auditor),
  };
}

const mediaTypeOf = (header: string | undefined) => header?.split(";")[0] ?? "";

describe("the published description", () => {
  it("has the structure of OpenAPI 3.1, without an id used twice or a reference to nothing", () => {
    expect(openApiStructure.safeParse(document).error?.issues).toBeUndefined();
    const ids = [...operations.values()].map(({ operationId }) => operationId);
    expect(new Set(ids).size).toBe(ids.length);
    const known = Object.keys(document.components.schemas).map((name) => `#/components/schemas/${name}`);
    const referred = new Set(referencesIn(document));
    expect([...referred].filter((reference) => !known.includes(reference))).toEqual([]);
    expect(referred).toContain("#/components/schemas/PlanDocument");
    expect(referred).toContain("#/components/schemas/ScreeningResult");
  });

  it("declares exactly the parameters that each path names", () => {
    for (const [name, { parameters = [] }] of operations) {
      const inPath = [...name.matchAll(/\{(\w+)\}/g)].map(([, parameter]) => parameter);
      const declared = parameters.filter((one) => one.in === "path");
      expect([name, declared.map((one) => [one.name, one.required])]).toEqual([
        name,
        inPath.map((parameter) => [parameter, true]),
      ]);
    }
  });

  it("holds every endpoint that the permission walk knows, and no other", () => {
    const walked = Object.keys(endpointWalk).map((name) => name.replace(/\[(\w+)\]/g, "{$1}"));
    expect([...operations.keys()].sort()).toEqual(walked.sort());
    expect(Object.keys(documentedCalls).sort()).toEqual(walked.sort());
  });

  it("says who may in words, and asks for the session where not anybody may", () => {
    for (const [name, row] of Object.entries(endpointWalk)) {
      const operation = operations.get(name.replace(/\[(\w+)\]/g, "{$1}"));
      expect([name, operation?.security]).toEqual([name, row.by === "anyone" ? [] : [{ session: [] }]]);
      if (typeof row.by !== "string")
        for (const role of row.by)
          expect([name, operation?.description]).toEqual([name, expect.stringContaining(role)]);
    }
  });
});

describe("the published schemas", () => {
  it("are those inside the description", async () => {
    const plan = await published("/api/schemas/plan.json");
    const result = await published("/api/schemas/result.json");
    expect(plan).toMatchObject(document.components.schemas["PlanDocument"] ?? { absent: true });
    expect(result["properties"]).toEqual(document.components.schemas["ScreeningResult"]?.["properties"]);
  });

  it("take what the application takes and refuse what it refuses", async () => {
    const judge = z.fromJSONSchema((await published("/api/schemas/plan.json")) as never);
    const [circuit] = awkwardPlan.circuits;
    const [sensor] = awkwardPlan.sensors;
    const cases: [boolean, unknown][] = [
      [true, awkwardPlan],
      [true, parsed(awkwardPlan)],
      [false, { ...awkwardPlan, colour: "red" }],
      [false, { ...awkwardPlan, circuits: "none" }],
      [false, { ...awkwardPlan, circuits: [{ ...circuit, conductorRadiusM: 0 }] }],
      [false, { ...awkwardPlan, sensors: [{ ...sensor, position: [1, 2] }] }],
      [false, { ...awkwardPlan, sensors: [{ ...sensor, position: [1, 2, 3, 4] }] }],
      [false, { ...awkwardPlan, sensors: [{ ...sensor, limits: [] }] }],
    ];
    for (const [taken, candidate] of cases) {
      expect([judge.safeParse(candidate).success, candidate]).toEqual([taken, candidate]);
      expect([planDocumentSchema.safeParse(candidate).success, candidate]).toEqual([taken, candidate]);
    }
    const results = z.fromJSONSchema((await published("/api/schemas/result.json")) as never);
    expect(results.safeParse(awkwardResult).success).toBe(true);
    expect(results.safeParse({ ...awkwardResult, verdict: "perhaps" }).success).toBe(false);
  });
});

// Vitest titles come before the document is read; a name that is not documented fails on its own.
const calls = Object.entries(documentedCalls);

describe("an endpoint answers as it is described", () => {
  it.each(calls)("%s", async (name, { status, make }) => {
    const answer = await make(caller);
    expect([answer.status, answer.status === status ? null : answer.text]).toEqual([status, null]);
    const documented = operations.get(name)?.responses[String(status)];
    expect(documented).toBeDefined();
    const content = documented?.content;
    if (content === undefined) {
      expect(answer.text ?? "").toBe("");
      return;
    }
    const mediaType = mediaTypeOf(answer.headers["content-type"]);
    expect(Object.keys(content)).toContain(mediaType);
    const schema = content[mediaType]?.schema;
    if (schema === undefined) return;
    expect(judgeOf(document, schema).safeParse(JSON.parse(answer.text)).error?.issues).toBeUndefined();
  });
});

const walked = Object.entries(endpointWalk).map(([name, row]) => [name, row] as const);

describe("a refusal is one of those described", () => {
  it.each(walked)("%s", async (name, { by }) => {
    const [method = "", address = ""] = name.split(" ");
    const path = address.replace(/\[\w+\]/g, () => crypto.randomUUID());
    const responses = operations.get(name.replace(/\[(\w+)\]/g, "{$1}"))?.responses ?? {};
    const lower = method.toLowerCase() as "get" | "post" | "put" | "patch" | "delete";
    const refusals = [
      // Without a session; with one that names nothing that is there; from a foreign page.
      ...(by === "anyone" ? [] : [await request(app.server)[lower](path).set("Origin", app.origin)]),
      ...(address.includes("[") ? [await as(app, everyRole)(lower, path)] : []),
      ...(lower === "get"
        ? []
        : [await request(app.server)[lower](path).set("Origin", "https://foreign.example")]),
    ];
    for (const { status, body } of refusals) {
      const { code } = (body as { error: { code: ErrorCode } }).error;
      expect(statusByErrorCode[code]).toBe(status);
      const described = responses[String(status)];
      expect(described?.description).toContain(code);
      const schema = described?.content?.["application/json"]?.schema ?? {};
      expect(judgeOf(document, schema).safeParse(body).error?.issues).toBeUndefined();
    }
  });
});
