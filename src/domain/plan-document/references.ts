import type { Circuit, Route } from "./circuit";
import type { Equipment } from "./equipment";
import type { Sensor } from "./sensor";

interface Referring {
  earthField: unknown;
  routes: Route[];
  circuits: Circuit[];
  equipment: Equipment[];
  loadCases: { id: string; factors: Record<string, number> }[];
  sensors: Sensor[];
}

interface Fault {
  path: (string | number)[];
  message: string;
}

/** Faults between the parts of a document: ids used twice, references to nothing, factors and limits that cannot be applied. */
export function referenceFaults(document: Referring): Fault[] {
  return [
    ...duplicates("routes", document.routes),
    ...duplicates("circuits", document.circuits),
    ...duplicates("equipment", document.equipment, new Set(document.circuits.map(({ id }) => id))),
    ...duplicates("loadCases", document.loadCases),
    ...duplicates("sensors", document.sensors),
    ...routeFaults(document),
    ...factorFaults(document),
    ...earthFaults(document),
  ];
}

function duplicates(list: string, entries: { id: string }[], taken = new Set<string>()): Fault[] {
  const seen = new Set(taken);
  return entries.flatMap(({ id }, index) => {
    if (!seen.has(id)) {
      seen.add(id);
      return [];
    }
    return [{ path: [list, index, "id"], message: `the id "${id}" is used twice` }];
  });
}

function routeFaults({ circuits, routes }: Referring): Fault[] {
  const known = new Set(routes.map(({ id }) => id));
  return circuits.flatMap(({ route }, index) =>
    route && !known.has(route.id)
      ? [{ path: ["circuits", index, "route", "id"], message: `there is no route "${route.id}"` }]
      : [],
  );
}

function factorFaults({ loadCases, circuits, equipment }: Referring): Fault[] {
  const alternating = new Map<string, boolean>();
  for (const { id, supply } of circuits) alternating.set(id, supply !== null && supply.kind !== "dc");
  for (const item of equipment) {
    alternating.set(item.id, item.kind === "dipole" ? item.frequencyHz > 0 : item.supply.kind !== "dc");
  }
  return loadCases.flatMap(({ factors }, index) =>
    Object.entries(factors).flatMap(([id, factor]) => {
      const path = ["loadCases", index, "factors", id];
      if (!alternating.has(id)) return [{ path, message: `there is no circuit or equipment "${id}"` }];
      if (factor < 0 && alternating.get(id)) {
        return [{ path, message: "a negative factor reverses DC only; turn AC with phaseDeg" }];
      }
      return [];
    }),
  );
}

function earthFaults({ earthField, sensors }: Referring): Fault[] {
  if (earthField) return [];
  return sensors.flatMap(({ limits }, sensorIndex) =>
    limits.flatMap(({ kind }, limitIndex) =>
      kind === "heading" || kind === "range"
        ? [
            {
              path: ["sensors", sensorIndex, "limits", limitIndex],
              message: `a ${kind} limit needs earthField: give the site's place and date, or the surveyed field`,
            },
          ]
        : [],
    ),
  );
}
