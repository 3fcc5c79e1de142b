import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { LiveScreener } from "~/screening/live";
import { screen } from "~/screening/screen";
import { runSteps } from "~/screening/steps";
import { cpuSeconds, median, rounded } from "./measure";
import { CIRCUITS, LOAD_CASES, SENSORS, screenPlan } from "./screen-plan";

const SENSOR_MOVES = 20;
const VERTEX_MOVES = 2;
const ROUNDS = 2;

/** Moving one sensor, and one vertex of a route, on a plan that a worker has screened before, against screening it afresh. */
export function benchDrag(): Promise<object> {
  const document = screenPlan();
  const live = new LiveScreener();
  runSteps(live.steps(document), {});
  const whole = Array.from({ length: ROUNDS }, () => cpuSeconds(() => screen(document)));
  const times = (count: number, moved: (step: number) => PlanDocument) =>
    median(
      Array.from({ length: count }, (_, i) => {
        const next = moved(i);
        return cpuSeconds(() => runSteps(live.steps(next), {}));
      }),
    );
  const sensorCpu = times(SENSOR_MOVES, (step) => withSensorMoved(document, 7 * step, 0.1));
  const vertexCpu = times(VERTEX_MOVES, (step) => withVertexMoved(document, 0.1 * (step + 1)));
  const cpu = median(whole);
  return Promise.resolve({
    name: "drag",
    circuits: CIRCUITS,
    sensors: SENSORS,
    loadCases: LOAD_CASES,
    threads: 1,
    cpuSeconds: rounded(sensorCpu),
    vertexCpuSeconds: rounded(vertexCpu),
    wholeCpuSeconds: rounded(cpu),
    ratio: rounded(cpu / sensorCpu),
    vertexRatio: rounded(cpu / vertexCpu),
  });
}

function withSensorMoved(document: PlanDocument, index: number, byM: number): PlanDocument {
  const sensors = document.sensors.map((sensor, i) => {
    if (i !== index) return sensor;
    const [x, y, z] = sensor.position;
    return { ...sensor, position: [x + byM, y, z] as typeof sensor.position };
  });
  return { ...document, sensors };
}

function withVertexMoved(document: PlanDocument, byM: number): PlanDocument {
  const routes = document.routes.map((route, i) => {
    if (i > 0) return route;
    return {
      ...route,
      path: route.path.map(
        ([x, y, z], k) => (k === 5 ? [x, y, z + byM] : [x, y, z]) as (typeof route.path)[number],
      ),
    };
  });
  return { ...document, routes };
}
