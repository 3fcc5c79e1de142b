import type { EarthField } from "~/domain/plan-document/earth-field";
import type { EarthElements } from "~/domain/screening-result";
import { degrees, radians } from "~/domain/units";
import {
  COMPASS_BLACKOUT_T,
  COMPASS_CAUTION_T,
  modelDeclinationSigmaRad,
  modelElements,
  MODEL_HORIZONTAL_SIGMA_T,
  OutsideModelYearsError,
  statedElements,
} from "~/field/geomagnetic";
import type { Vector } from "~/field/vector";
import type { ResolvedPlanDocument } from "~/domain/plan-document/resolved";
import { RefusedDocumentError } from "./refusal";

/** The Earth's field turned into the plan frame. */
export interface PlanEarth {
  elements: EarthElements;
  /** Field vector in plan axes, T. */
  fieldT: Vector;
  /** Unit vectors toward magnetic north and magnetic east, plan axes. */
  northward: Vector;
  eastward: Vector;
  /** Standard uncertainties of horizontal intensity and declination; 0 where the field is stated. */
  horizontalSigmaT: number;
  declinationSigmaRad: number;
}

/**
 * Null where the document states no Earth field. Throws RefusedDocumentError outside the model's years, and for
 * heading limits where the horizontal intensity is below 2000 nT.
 */
export function planEarth(document: ResolvedPlanDocument): PlanEarth | null {
  if (!document.earthField) return null;
  const elements = elementsOf(document.earthField);
  refuseBlackout(document, elements);
  return turnedIntoPlan(elements, document.frame.northBearingDeg, document.earthField.mode === "model");
}

export function earthWarnings(earth: PlanEarth | null): string[] {
  if (!earth || earth.elements.horizontalT >= COMPASS_CAUTION_T) return [];
  const horizontalNT = Math.round(earth.elements.horizontalT * 1e9);
  return [
    `The horizontal intensity here is ${horizontalNT} nT, below 6000 nT: compasses are unreliable at this place.`,
  ];
}

/** Elements in the plan frame: +y points to the true bearing β, magnetic north is true north turned clockwise by D. */
export function turnedIntoPlan(
  elements: EarthElements,
  northBearingDeg: number,
  modelled: boolean,
): PlanEarth {
  const bearingRad = radians(elements.declinationDeg - northBearingDeg);
  // A bearing γ from +y, clockwise, is (sin γ, cos γ) in the plan.
  const northward: Vector = [Math.sin(bearingRad), Math.cos(bearingRad), 0];
  const eastward: Vector = [Math.cos(bearingRad), -Math.sin(bearingRad), 0];
  return {
    elements,
    fieldT: [northward[0] * elements.horizontalT, northward[1] * elements.horizontalT, -elements.downT],
    northward,
    eastward,
    horizontalSigmaT: modelled ? MODEL_HORIZONTAL_SIGMA_T : 0,
    declinationSigmaRad: modelled ? modelDeclinationSigmaRad(elements.horizontalT) : 0,
  };
}

/**
 * Compass deviation δ (rad) by a horizontal disturbance: atan2(b⊥, H + b∥), ∥ along magnetic north, ⊥ toward magnetic east.
 */
export function deviationRad(earth: PlanEarth, disturbanceT: Vector): number {
  const { northward, eastward, elements } = earth;
  const alongNorth = disturbanceT[0] * northward[0] + disturbanceT[1] * northward[1];
  const towardEast = disturbanceT[0] * eastward[0] + disturbanceT[1] * eastward[1];
  return Math.atan2(towardEast, elements.horizontalT + alongNorth);
}

export const deviationDeg = (earth: PlanEarth, disturbanceT: Vector): number =>
  degrees(deviationRad(earth, disturbanceT));

function elementsOf(earthField: EarthField): EarthElements {
  if (earthField.mode === "stated") {
    return statedElements(earthField.horizontalT, earthField.verticalT, earthField.declinationDeg);
  }
  try {
    const { latitudeDeg, longitudeDeg, altitudeM, date } = earthField;
    return modelElements(latitudeDeg, longitudeDeg, altitudeM, date);
  } catch (error) {
    if (!(error instanceof OutsideModelYearsError)) throw error;
    throw new RefusedDocumentError([{ path: "earthField.date", message: error.message }]);
  }
}

function refuseBlackout(document: ResolvedPlanDocument, { horizontalT }: EarthElements): void {
  if (horizontalT >= COMPASS_BLACKOUT_T) return;
  const message = `the horizontal intensity here is ${Math.round(horizontalT * 1e9)} nT; below 2000 nT no compass heading is judged`;
  const faults = document.sensors.flatMap(({ limits }, sensor) =>
    limits.flatMap(({ kind }, limit) =>
      kind === "heading" ? [{ path: `sensors[${sensor}].limits[${limit}]`, message }] : [],
    ),
  );
  if (faults.length > 0) throw new RefusedDocumentError(faults);
}
