import type { ClearPosition, Searched } from "~/domain/clearing";
import { formatLength } from "~/domain/format";

/** "0.93 m towards 103° true", "0.98 m up", "0.43 m towards 148° true and 0.72 m up". */
export function moveWords({
  distanceM,
  bearingDeg,
  riseM,
}: Pick<ClearPosition, "distanceM" | "bearingDeg" | "riseM">): string {
  const levelM = Math.sqrt(Math.max(0, distanceM ** 2 - riseM ** 2));
  const level = bearingDeg === null ? [] : [`${formatLength(levelM)} towards ${bearingText(bearingDeg)}`];
  const rise =
    Math.abs(riseM) < 5e-4 ? [] : [`${formatLength(Math.abs(riseM))} ${riseM > 0 ? "up" : "down"}`];
  return [...level, ...rise].join(" and ");
}

/** A true bearing as it is spoken: three digits. */
export const bearingText = (bearingDeg: number): string =>
  `${String(Math.round(bearingDeg) % 360).padStart(3, "0")}°\u00a0true`;

/** Where was looked, to end a sentence with. */
export function searchedWords({ region, zoneName, fromHeightM, toHeightM, furthestM }: Searched): string {
  const where =
    region === "zone"
      ? `in the zone “${zoneName ?? ""}”`
      : region === "sheet"
        ? "on the drawing"
        : "around what is drawn";
  return `${where}, from ${formatLength(fromHeightM)} to ${formatLength(toHeightM)} high, up to ${formatLength(furthestM)} away`;
}
