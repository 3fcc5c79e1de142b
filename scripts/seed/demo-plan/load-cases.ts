import type { PlanDocumentInput } from "../../../src/domain/plan-document/plan-document";

type LoadCases = NonNullable<PlanDocumentInput["loadCases"]>;

const charging = (dockFactor: number, inputFactor = dockFactor) =>
  Object.fromEntries(
    [1, 2, 3, 4].flatMap((number) => [
      [`dock-supply-${String(number)}`, dockFactor],
      [`charger-${String(number)}`, inputFactor],
    ]),
  );

/** Shares of the currents as entered; what is not named flows in full. */
export const loadCases = [
  {
    id: "normal",
    name: "Normal, vehicles out",
    factors: { "string-a": 0.04, solar: 0.7, "riser-r1": 0.6, "hall-feeder": 0.8, ...charging(0.05) },
  },
  {
    id: "charging",
    name: "Charging, all docks taken",
    factors: { "string-a": -0.12, solar: 1, "riser-r1": 0.9, ...charging(1) },
  },
  {
    id: "night",
    name: "Night",
    factors: {
      "string-a": 0.04,
      solar: 0,
      "riser-r1": 0.3,
      "hall-feeder": 0.4,
      "air-handling": 0.5,
      ...charging(0.4),
    },
  },
  {
    id: "mains-failure",
    name: "Mains failure, UPS on battery",
    factors: { solar: 0, "riser-r1": 0, "hall-feeder": 0.5, "air-handling": 0, ...charging(0) },
  },
] satisfies LoadCases;
