import type { DocumentFault } from "~/domain/plan-document/parse";
import type { PlanDocument } from "~/domain/plan-document/plan-document";

/** What the schema knows and this engine does not compute: refused with its path, never ignored. */
export function notYetComputed(document: PlanDocument): DocumentFault[] {
  const circuits = document.circuits.flatMap(({ arrangement }, index) =>
    arrangement.kind === "twisted-pair"
      ? [
          {
            path: `circuits[${index}].arrangement.kind`,
            message: "twisted pairs are not computed by this engine version",
          },
        ]
      : [],
  );
  const equipment = document.equipment.flatMap((item, index) =>
    item.kind !== "dipole" || item.direction
      ? [
          {
            path: `equipment[${index}].kind`,
            message: `this ${item.kind} is not computed by this engine version`,
          },
        ]
      : [],
  );
  return [...circuits, ...equipment];
}
