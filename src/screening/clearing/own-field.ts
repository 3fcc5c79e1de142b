import { limitValue } from "~/domain/plan-document/sensor";
import { sectionFrames, type Leg } from "~/field/section-frames";
import { add, dot, scale, type Vector } from "~/field/vector";
import { LimitJudging, SensorJudging } from "../judging";
import { caseFactors, type CaseFactors } from "../load-cases";
import type { PreparedPlan } from "../prepared-plan";
import type { TabledLimit } from "./distance-limits";

/** The field of one straight circuit through the origin around its middle, as shares of limits. */
export class OwnField {
  /** Nearer than this to the centre line is between or inside the conductors, metres. */
  readonly insideM: number;
  private readonly leg: Leg;
  private readonly factors: CaseFactors;
  private readonly known = new Map<string, SensorJudging>();

  constructor(
    private readonly prepared: PreparedPlan,
    private readonly limits: readonly TabledLimit[],
  ) {
    const { plan } = prepared;
    const [item] = plan.items;
    const [factors] = caseFactors(plan);
    if (item?.kind !== "circuit" || !factors) throw new RangeError("there is no circuit to look at");
    const framed = sectionFrames(item.circuit.path ?? []);
    const leg = framed.ok ? framed.frames.legs[0] : undefined;
    if (!leg) throw new RangeError("the circuit has no extent");
    this.leg = leg;
    this.factors = factors;
    this.insideM =
      item.conductorRadiusM + Math.max(0, ...item.conductors.map(({ points }) => offsetOf(points, leg)));
  }

  /** Value / limit at an angle from u towards v and a distance from the centre line. */
  shareAt(limit: number, angleRad: number, radiusM: number): number {
    const tabled = this.limits[limit];
    const at = this.judgingAt(angleRad, radiusM);
    const own = at.sensor.limits[limit];
    if (!own || !tabled) throw new RangeError(`there is no limit number ${limit}`);
    const judging = new LimitJudging(at, own);
    const state = judging.stateIn(this.factors);
    const value = tabled.isHorizontal
      ? Math.hypot(state.groups[0] ?? 0, state.groups[1] ?? 0)
      : judging.measure.value(state);
    return value / limitValue(own);
  }

  private judgingAt(angleRad: number, radiusM: number): SensorJudging {
    const key = `${angleRad} ${radiusM}`;
    const known = this.known.get(key);
    if (known) return known;
    const { plan, earth } = this.prepared;
    const [sensor] = plan.document.sensors;
    if (!sensor) throw new RangeError("there is no observer");
    const { u, v } = this.leg;
    const [p, q] = [radiusM * Math.cos(angleRad), radiusM * Math.sin(angleRad)];
    const at = add(scale(u, p), scale(v, q));
    const judging = new SensorJudging(plan, { ...sensor, position: [...at] }, earth);
    this.known.set(key, judging);
    return judging;
  }
}

/** Greatest distance of a conductor from the line of the leg, its ends on the line left out. */
function offsetOf(points: readonly Vector[], { u, v }: Leg): number {
  return Math.max(0, ...points.map((at) => Math.hypot(dot(at, u), dot(at, v))));
}
