import type { Limit, Sensor } from "~/domain/plan-document/sensor";
import { boundClass, boundsAt, type BoundField } from "./bounds";
import type { CompiledPlan } from "./compile";
import type { PlanEarth } from "./earth";
import type { CaseFactors } from "./load-cases";
import { limitMeasure, type LimitMeasure } from "./measures/measure-of";
import type { Measured, MeasuredState } from "./measures/measure";
import { backgroundState, type BackgroundState } from "./sensor-background";
import { SensorField, sumGroups } from "./sensor-field";
import { sensorFamilies } from "./uncertainty/sensor-families";
import type { InputFamily } from "./uncertainty/families";
import { strayInputs, type StrayInput } from "./uncertainty/stray";

/** One sensor made ready: the field of every component there, and what its limits need of it, each computed once. */
export class SensorJudging {
  readonly field: SensorField;
  readonly bounds: BoundField;
  private readonly families = new Map<3 | 9, InputFamily[]>();
  private near: number[] | null = null;
  private readonly strays = new Map<3 | 9, StrayInput[]>();

  constructor(
    readonly plan: CompiledPlan,
    readonly sensor: Sensor,
    readonly earth: PlanEarth | null,
  ) {
    this.field = new SensorField(plan, sensor.position);
    this.bounds = boundsAt(plan.bounds, sensor.position);
  }

  familiesFor(width: 3 | 9): InputFamily[] {
    const known = this.families.get(width);
    if (known) return known;
    const families = sensorFamilies(this.field, width, this.sensor.positionToleranceM);
    this.families.set(width, families);
    return families;
  }

  /** Items that position tolerances move by more than first order tells; found once. */
  nearItems(find: () => number[]): number[] {
    this.near ??= find();
    return this.near;
  }

  straysFor(width: 3 | 9): StrayInput[] {
    const known = this.strays.get(width);
    if (known) return known;
    const strays = strayInputs(this.plan, this.sensor.position, width);
    this.strays.set(width, strays);
    return strays;
  }
}

/** One limit of a sensor: its measure, which components and bounds take part, its background. */
export class LimitJudging {
  readonly measure: LimitMeasure;
  readonly included: boolean[];
  readonly background: BackgroundState;
  /** Bound of each bound item at load factor 1 in the limit's quantity (T or T/m); 0 where it takes no part. */
  readonly itemBounds: Float64Array;
  readonly boundClasses: number[];

  constructor(
    readonly at: SensorJudging,
    readonly limit: Limit,
  ) {
    const { plan, sensor, bounds } = at;
    this.measure = limitMeasure(limit, sensor.axis, plan.frequencies.groups, plan.document.unknownPhase);
    this.included = plan.components.map(({ drive }) => this.measure.includes(drive.frequencyHz));
    this.background = backgroundState(sensor, limit.kind, this.measure, plan.frequencies);
    const quantity = this.measure.width === 3 ? bounds.fieldT : bounds.gradientTPerM;
    this.itemBounds = quantity.map((value, i) =>
      this.measure.includes(plan.bounds[i]?.frequencyHz ?? 0) ? value : 0,
    );
    this.boundClasses = plan.bounds.map((bound) => boundClass(bound, plan.frequencies));
  }

  get stride(): 6 | 18 {
    return this.measure.width === 3 ? 6 : 18;
  }

  /** Phasors of every component in the limit's quantity, load factor 1. */
  get phasors(): Float64Array {
    return this.measure.width === 3 ? this.at.field.phasors : this.at.field.gradients;
  }

  stateIn(factors: CaseFactors): MeasuredState {
    const { plan, earth } = this.at;
    const groups = new Float64Array(this.stride * plan.frequencies.groups.length);
    sumGroups(plan, this.phasors, this.stride, factors.items, this.included, groups);
    this.background.staticT.forEach((component, i) => (groups[i] = (groups[i] as number) + component));
    return { groups, bounds: this.boundsIn(factors), earth };
  }

  /** Bounds per frequency class, the background's magnitudes among them. */
  boundsIn({ bounds: factors }: CaseFactors): Float64Array {
    const bounds = Float64Array.from(this.background.bounds);
    this.itemBounds.forEach((bound, i) => {
      const classIndex = this.boundClasses[i] as number;
      bounds[classIndex] = (bounds[classIndex] as number) + bound * (factors[i] as number);
    });
    return bounds;
  }

  measureIn(factors: CaseFactors): { state: MeasuredState; measured: Measured } {
    const state = this.stateIn(factors);
    return { state, measured: this.measure.measure(state) };
  }
}
