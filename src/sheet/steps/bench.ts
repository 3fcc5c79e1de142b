import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Point2 } from "../geometry";
import type { Selection } from "../selection";
import { noModifiers, type Modifiers } from "../snapping";
import type { Step, StepResult, Surroundings } from "./step";

/** Runs a step through events without React or a canvas, as the session does. For tests. */
export class StepBench {
  result: StepResult;
  around: Surroundings;

  constructor(step: Step, document: PlanDocument, part: Partial<Surroundings> = {}) {
    this.result = { kind: "going", step };
    this.around = {
      document,
      selection: [],
      snap: { vertices: true, rightAngles: true, gridM: 0.1 },
      reachM: 0.1,
      siteEarth: null,
      ...part,
    };
  }

  get step(): Step {
    if (this.result.kind !== "going") throw new Error(`The step is over: ${this.result.kind}.`);
    return this.result.step;
  }

  get selection(): Selection {
    return this.around.selection;
  }

  get finished(): Extract<StepResult, { kind: "finished" }> {
    if (this.result.kind !== "finished") throw new Error(`The step is not finished: ${this.result.kind}.`);
    return this.result;
  }

  press = (at: Point2, modifiers: Partial<Modifiers> = {}) => this.pointer("press", at, modifiers);
  move = (at: Point2, modifiers: Partial<Modifiers> = {}) => this.pointer("move", at, modifiers);
  drag = (at: Point2, modifiers: Partial<Modifiers> = {}) => this.pointer("drag", at, modifiers);
  release = (at: Point2, modifiers: Partial<Modifiers> = {}) => this.pointer("release", at, modifiers);

  key(key: string, modifiers: Partial<Modifiers> = {}): this {
    return this.take(this.step.key(key, { ...noModifiers, ...modifiers }, this.around));
  }

  type(inputId: string, text: string): this {
    return this.take(this.step.type(inputId, text, this.around));
  }

  problemOf(inputId: string): string | undefined {
    return this.step.inputs.find(({ id }) => id === inputId)?.problem;
  }

  private pointer(
    event: "press" | "move" | "drag" | "release",
    at: Point2,
    modifiers: Partial<Modifiers>,
  ): this {
    return this.take(this.step[event](at, { ...noModifiers, ...modifiers }, this.around));
  }

  private take(result: StepResult): this {
    this.result = result;
    if (result.kind !== "abandoned" && result.select !== undefined) {
      this.around = { ...this.around, selection: result.select };
    }
    return this;
  }
}
