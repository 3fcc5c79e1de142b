import type { Vector } from "~/field/vector";
import { gradientPhasorsAt, type SensorField } from "../sensor-field";

/** Step (m) over which gradients are differenced: their own derivative has no closed form here. */
const GRADIENT_STEP_M = 1e-4;

const AXES: readonly Vector[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/**
 * Change of every component's phasors per metre that the sensor moves along x, y and z: three arrays of the stride of the
 * width (3: 6 numbers a component, from the analytic gradient; 9: 18 numbers).
 */
export function displacementDerivatives(field: SensorField, width: 3 | 9): Float64Array[] {
  return width === 3
    ? AXES.map((_, axis) => columnOf(field, axis))
    : AXES.map((axis) => differenced(field, axis));
}

function columnOf({ gradients, plan }: SensorField, axis: number): Float64Array {
  const out = new Float64Array(6 * plan.components.length);
  for (let component = 0; component < plan.components.length; component++) {
    for (let i = 0; i < 3; i++) {
      out[6 * component + i] = gradients[18 * component + 3 * i + axis] as number;
      out[6 * component + 3 + i] = gradients[18 * component + 9 + 3 * i + axis] as number;
    }
  }
  return out;
}

function differenced({ plan, position }: SensorField, axis: Vector): Float64Array {
  const at = (side: 1 | -1) => {
    const moved = position.map((c, i) => c + side * GRADIENT_STEP_M * (axis[i] as number));
    return gradientPhasorsAt(plan, moved as unknown as Vector, "currents");
  };
  const ahead = at(1);
  const behind = at(-1);
  return ahead.map((value, i) => (value - (behind[i] as number)) / (2 * GRADIENT_STEP_M));
}
