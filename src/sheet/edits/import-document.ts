import type { PlanDocument } from "~/domain/plan-document/plan-document";

/**
 * A document from a file in the place of the present one. The plan keeps its name, and its own image with the scale: an image
 * belongs to the plan that it was uploaded to, so that a foreign one would show nothing.
 */
export function importedInto(present: PlanDocument, imported: PlanDocument): PlanDocument {
  if (imported.drawing.sheet?.drawingId === present.drawing.sheet?.drawingId)
    return { ...imported, name: present.name };
  const rest = Object.fromEntries(
    Object.entries(imported.drawing).filter(([key]) => key !== "sheet" && key !== "scale"),
  );
  const { sheet, scale } = present.drawing;
  return {
    ...imported,
    name: present.name,
    drawing: { ...rest, ...(sheet && { sheet }), ...(scale && { scale }) },
  };
}
