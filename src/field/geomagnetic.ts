import geomagnetism from "geomagnetism";
import { degrees, kilometres, radians, teslaFromNanotesla } from "../domain/units";

/** The Earth's field at a place: true north, true east and down, tesla; declination east positive, inclination down positive. */
export interface GeomagneticElements {
  northT: number;
  eastT: number;
  downT: number;
  horizontalT: number;
  declinationDeg: number;
  inclinationDeg: number;
  model: string;
}

/** Below this horizontal intensity compasses are unreliable (caution zone of the World Magnetic Model). */
export const COMPASS_CAUTION_T = 6000e-9;
/** Below this one heading is refused (blackout zone of the World Magnetic Model). */
export const COMPASS_BLACKOUT_T = 2000e-9;

/** One-sigma error of the model's horizontal intensity, tesla: WMM2025 error model, second hand. */
export const MODEL_HORIZONTAL_SIGMA_T = 133e-9;

/** One-sigma error of the model's declination, radians: WMM2025 error model, second hand. */
export function modelDeclinationSigmaRad(horizontalT: number): number {
  return radians(Math.hypot(0.26, 5417 / (horizontalT * 1e9)));
}

export class OutsideModelYearsError extends Error {
  override name = "OutsideModelYearsError";
}

/**
 * Elements by the World Magnetic Model of the date (`YYYY-MM-DD`), height in metres above the ellipsoid.
 * Throws OutsideModelYearsError for a date that no model on board covers.
 */
export function modelElements(
  latitudeDeg: number,
  longitudeDeg: number,
  altitudeM: number,
  date: string,
): GeomagneticElements {
  const time = new Date(`${date}T00:00:00Z`);
  const model = modelFor(time, date);
  // The package takes longitudes of ±180° and altitude in kilometres.
  const longitude = longitudeDeg > 180 ? longitudeDeg - 360 : longitudeDeg;
  const { x, y, z } = model.point([latitudeDeg, longitude, kilometres(altitudeM)]);
  return elementsOf(
    teslaFromNanotesla(x),
    teslaFromNanotesla(y),
    teslaFromNanotesla(z),
    model.name.replace("-", ""),
  );
}

/** Elements of a surveyed field: horizontal and vertical (down) intensity, tesla, and declination. */
export function statedElements(
  horizontalT: number,
  verticalT: number,
  declinationDeg: number,
): GeomagneticElements {
  const declinationRad = radians(declinationDeg);
  return {
    northT: horizontalT * Math.cos(declinationRad),
    eastT: horizontalT * Math.sin(declinationRad),
    downT: verticalT,
    horizontalT,
    declinationDeg,
    inclinationDeg: degrees(Math.atan2(verticalT, horizontalT)),
    model: "stated",
  };
}

function modelFor(time: Date, date: string): ReturnType<typeof geomagnetism.model> {
  try {
    return geomagnetism.model(time);
  } catch (cause) {
    const message = `no World Magnetic Model on board covers ${date}; it covers 2014-12-15 to 2029-11-13. State the surveyed field instead`;
    throw new OutsideModelYearsError(message, { cause });
  }
}

function elementsOf(northT: number, eastT: number, downT: number, model: string): GeomagneticElements {
  const horizontalT = Math.hypot(northT, eastT);
  return {
    northT,
    eastT,
    downT,
    horizontalT,
    declinationDeg: degrees(Math.atan2(eastT, northT)),
    inclinationDeg: degrees(Math.atan2(downT, horizontalT)),
    model,
  };
}
