import { MessageChannel } from "node:worker_threads";
import { afterEach, describe, expect, it } from "vitest";
import { CLEARING_PARTS } from "~/domain/clearing";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { clearing } from "~/screening/clearing/clearing";
import { fieldMap, levelGrid, type FieldMapRequest } from "~/screening/field-map";
import { screen } from "~/screening/screen";
import { clientOver, type ScreeningClient } from "./client";
import { JobRunner } from "./job-runner";
import { ScreeningFailedError } from "./protocol";

const closing: (() => void)[] = [];
afterEach(() => closing.splice(0).forEach((close) => close()));

/** A client and a runner on the two ends of a real message port, as page and worker have them. */
function connected(): ScreeningClient {
  const { port1, port2 } = new MessageChannel();
  const runner = new JobRunner((response, transfer) => port2.postMessage(response, transfer));
  port2.on("message", (request) => runner.receive(request));
  const client = clientOver({
    post: (request) => port1.postMessage(request),
    onResponse: (listener) => port1.on("message", listener),
    onFailure: (listener) => port1.on("messageerror", listener),
    close: () => port1.close(),
  });
  closing.push(() => client.dispose());
  return client;
}

function strungPlan(sensors: number): PlanDocument {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Port test"),
    circuits: [
      {
        id: "c1",
        name: "String",
        path: [
          [0, 0, 0],
          [9, 0, 0],
        ],
        arrangement: { kind: "pair", spacingM: 0.03 },
        conductorRadiusM: 0.006,
        supply: { kind: "dc", currentA: 120 },
      },
    ],
    sensors: Array.from({ length: sensors }, (_, i) => ({
      id: `s${i}`,
      name: `Probe ${i}`,
      position: [i / 100, 1, 0],
      limits: [{ kind: "static", limitT: 1e-6 }],
    })),
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

const mapRequest = (columns: number): FieldMapRequest => ({
  quantity: "static",
  loadCaseId: null,
  grid: levelGrid(1, 0, 0, 0.1, columns, columns),
});

describe("screening behind a message port", { timeout: 30_000 }, () => {
  it("gives what the engine gives", async () => {
    const client = connected();
    const document = strungPlan(3);
    expect(await client.screen(document)).toEqual(screen(document));
    expect(await client.map(document, mapRequest(5))).toEqual(fieldMap(document, mapRequest(5)));
    const request = { sensorIds: null, parts: [...CLEARING_PARTS] };
    const sensors = document.sensors.map((sensor) => ({
      ...sensor,
      limits: [{ id: "1", kind: "static" as const, limitT: 1e-8 }],
    }));
    const cleared = await client.clearing({ ...document, sensors }, request);
    expect(cleared.sensors).toHaveLength(3);
    expect(cleared).toEqual(clearing({ ...document, sensors }, request));
  });

  it("tells progress and hears a cancel while it works, then goes on with the next job", async () => {
    const client = connected();
    const document = strungPlan(1);
    const controller = new AbortController();
    const told: number[] = [];
    const long = client.map(document, mapRequest(1000), controller.signal, (done) => {
      told.push(done);
      controller.abort(new Error("moved on"));
    });
    await expect(long).rejects.toThrow("moved on");
    expect(told).toHaveLength(1);
    expect(told[0]).toBeLessThan(1000);
    expect(await client.screen(document)).toEqual(screen(document));
  });

  it("passes the faults of a refused document on", async () => {
    const document = { ...strungPlan(1), earthField: null };
    const refused = connected().map(document, { ...mapRequest(2), quantity: "heading" });
    await expect(refused).rejects.toThrow(ScreeningFailedError);
    await expect(refused).rejects.toMatchObject({ faults: [{ path: "earthField" }] });
  });
});
