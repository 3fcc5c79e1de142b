import { segmentKernel } from "~/field/kernel/fill-field";
import { SEGMENT_STRIDE } from "~/field/segment";
import { planRows } from "~/screening/influence";
import { preparePlan } from "~/screening/prepared-plan";
import { screen } from "~/screening/screen";
import { cpuSeconds, median, rounded } from "./measure";
import { CIRCUITS, LOAD_CASES, SENSORS, screenPlan } from "./screen-plan";

const ROUNDS = 3;

/**
 * A whole screening on one thread, contributions and uncertainty included, against the bare kernel on the same pairs of a segment and a
 * sensor. The two take turns; medians over the rounds.
 */
export function benchScreen(): Promise<object> {
  const document = screenPlan();
  const { rows, setStarts } = planRows(preparePlan(document).plan);
  const points = Float64Array.from(document.sensors.flatMap(({ position }) => position));
  const out = new Float64Array(points.length * (setStarts.length - 1));
  const kernel = segmentKernel();
  const bare = () => kernel.fillInfluence(rows, setStarts, points, out);
  bare();
  screen(document);
  const screened: number[] = [];
  const kernelled: number[] = [];
  let findings = 0;
  let drawn = 0;
  for (let round = 0; round < ROUNDS; round++) {
    kernelled.push(cpuSeconds(bare));
    screened.push(
      cpuSeconds(() => {
        const found = screen(document).sensors.flatMap((sensor) => sensor.findings);
        findings = found.length;
        drawn = found.filter(({ uncertaintyMethod }) => uncertaintyMethod === "monte-carlo").length;
      }),
    );
  }
  const cpu = median(screened);
  const kernelCpu = median(kernelled);
  return Promise.resolve({
    name: "screen",
    circuits: CIRCUITS,
    sensors: SENSORS,
    loadCases: LOAD_CASES,
    segments: rows.length / SEGMENT_STRIDE,
    findings,
    monteCarloFindings: drawn,
    threads: 1,
    cpuSeconds: rounded(cpu),
    kernelCpuSeconds: rounded(kernelCpu),
    ratio: rounded(cpu / kernelCpu),
  });
}
