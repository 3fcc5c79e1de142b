import type { Background } from "~/domain/plan-document/sensor";

/** What is known of the static background. */
export type StaticKnown = "none" | "magnitude" | "vector";

export const blankBackground: Background = {
  staticT: null,
  alternating: [],
  expandedUncertaintyT: 0,
  note: "",
};

export function knownAs(staticT: Background["staticT"]): StaticKnown {
  if (staticT === null) return "none";
  return typeof staticT === "number" ? "magnitude" : "vector";
}

/** The same background known otherwise: a vector has its magnitude, a magnitude lies along x until its parts are typed. */
export function staticOfKind(kind: StaticKnown, present: Background["staticT"]): Background["staticT"] {
  if (kind === "none") return null;
  const magnitudeT =
    present === null
      ? 0
      : typeof present === "number"
        ? present
        : Number(Math.hypot(...present).toPrecision(9));
  if (kind === "magnitude") return magnitudeT;
  return typeof present === "object" && present !== null ? present : [magnitudeT, 0, 0];
}
