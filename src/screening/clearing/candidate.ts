import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { limitValue, type Sensor } from "~/domain/plan-document/sensor";
import type { Vector } from "~/field/vector";
import { LimitJudging, SensorJudging } from "../judging";
import { caseFactors, swingFactors, type CaseFactors } from "../load-cases";
import { preparePlan, screenSensor, type PreparedPlan } from "../prepared-plan";
import { reachOfResult } from "./standing";

/** What full judgement says of a sensor at some place. */
export interface Judged {
  /** Largest (value + U) / limit of its limits in all load cases. */
  reach: number;
  /** Whether every limit holds and the model has nothing to say against the place itself. */
  clear: boolean;
  butForWaiting: boolean;
}

/** A sensor that can be asked about anywhere in its plan. */
export class MovableSensor {
  private readonly sensor: Sensor;
  private readonly cases: CaseFactors[];
  private readonly swings: CaseFactors[];

  constructor(
    private readonly document: PlanDocument,
    private readonly prepared: PreparedPlan,
    private readonly index: number,
  ) {
    this.sensor = prepared.resolved.sensors[index] as Sensor;
    this.cases = caseFactors(prepared.plan);
    this.swings = swingFactors(prepared.plan);
  }

  get position(): Vector {
    return this.sensor.position;
  }

  /**
   * Whether some value alone, without its uncertainty, is above its limit: then the place is not clear. Costs a fraction of the full
   * judgement, as neither gradients nor uncertainties are formed for most limits.
   */
  isOverAt(position: Vector): boolean {
    const { plan, earth } = this.prepared;
    const judging = new SensorJudging(plan, { ...this.sensor, position: [...position] }, earth);
    return this.sensor.limits.some((limit) => {
      const at = new LimitJudging(judging, limit);
      const bound = limitValue(limit);
      const cases = limit.kind === "swing" ? this.swings : this.cases;
      return cases.some((factors) => at.measure.value(at.stateIn(factors)) > bound);
    });
  }

  /** The engine's judgement at a place, its Monte Carlo seeded by the present document. */
  judgeAt(position: Vector): Judged {
    return judgedBy(movedTo(this.prepared, this.index, position), this.index);
  }

  /** The engine's judgement of the document with the sensor moved, to the byte. */
  verifyAt(position: Vector): Judged {
    const sensors = this.document.sensors.with(this.index, {
      ...(this.document.sensors[this.index] as Sensor),
      position: [...position],
    });
    return judgedBy(preparePlan({ ...this.document, sensors }), this.index);
  }
}

function movedTo(prepared: PreparedPlan, index: number, position: Vector): PreparedPlan {
  const { resolved } = prepared;
  const sensor = resolved.sensors[index] as Sensor;
  const sensors = resolved.sensors.with(index, { ...sensor, position: [...position] });
  return { ...prepared, resolved: { ...resolved, sensors } };
}

function judgedBy(prepared: PreparedPlan, index: number): Judged {
  const { result, warnings } = screenSensor(prepared, index);
  const fits = result.findings.every(
    ({ value, expandedUncertainty, limit }) => value + expandedUncertainty <= limit,
  );
  return {
    reach: reachOfResult(result),
    clear: fits && warnings.length === 0,
    butForWaiting: result.verdict !== "within",
  };
}
