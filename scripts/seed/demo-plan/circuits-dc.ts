import type { CircuitInput } from "../../../src/domain/plan-document/circuit";

/** Battery strings to the UPS: two cables on brackets 80 mm apart, over the switchroom's wall. */
const batteryString: CircuitInput = {
  id: "string-a",
  name: "UPS A, battery string",
  path: [
    [8.35, 1.8, 1.4],
    [8.35, 1.8, 2.9],
    [8.35, 7.3, 2.9],
    [10, 7.3, 2.9],
    [10, 5.3, 2.1],
  ],
  arrangement: { kind: "pair", spacingM: 0.08 },
  conductorRadiusM: 0.0081,
  supply: { kind: "dc", currentA: 320 },
  currentBasis: "rating-plate",
  strayCurrentA: 0,
  positionToleranceM: 0.05,
};

/** From the panels on the roof to the isolator in the plant strip; the two cables keep to either side of a beam. */
const solar: CircuitInput = {
  id: "solar",
  name: "Solar DC feed",
  path: [
    [47.2, 29.2, 6],
    [47.2, 29.2, 3.1],
    [44.1, 29.2, 3.1],
    [44.1, 21.1, 3.1],
    [44.1, 21.1, 1.5],
  ],
  arrangement: { kind: "pair", spacingM: 0.3 },
  conductorRadiusM: 0.00155,
  supply: { kind: "dc", currentA: 38 },
  currentBasis: "rating-plate",
  strayCurrentA: 0,
  positionToleranceM: 0.05,
};

/** A charger's output to its docks, in the duct from the charger down to the dock furthest along it. */
function dockSupply(
  number: number,
  docks: string,
  chargerX: number,
  dockX: number,
  currentA: number,
  spacingM = 0.026,
): CircuitInput {
  // Two pairs side by side in two layers, as they lie in the duct.
  const offsetM = number % 2 === 0 ? 0.03 : -0.03;
  const heightM = number > 2 ? 0.18 : 0.14;
  return {
    id: `dock-supply-${String(number)}`,
    name: `Dock supply CH ${String(number)}, ${docks}`,
    path: [
      [chargerX, 13.4, 1.2],
      [chargerX, 13.4, heightM],
      [26.5 + offsetM, 13.4, heightM],
      [26.5 + offsetM, 0.7 + offsetM, heightM],
      [dockX, 0.7 + offsetM, heightM],
      [dockX, 1, heightM],
    ],
    arrangement: { kind: "pair", spacingM },
    conductorRadiusM: 0.0049,
    supply: { kind: "dc", currentA },
    currentBasis: "load-list",
    loadGroup: "vehicle-charging",
    strayCurrentA: 0,
    positionToleranceM: 0.03,
  };
}

export const dcCircuits: CircuitInput[] = [
  batteryString,
  solar,
  // Pulled in as two loose cables; the others are laid side by side.
  dockSupply(1, "dock 1", 28.45, 29, 75, 0.07),
  dockSupply(2, "docks 2 and 3", 32.45, 35, 150),
  dockSupply(3, "docks 4 and 5", 38.05, 41, 150),
  dockSupply(4, "dock 6", 42.05, 44, 75),
];
