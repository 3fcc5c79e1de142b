import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { readPlanDocument } from "~/domain/plan-document/read";
import { resultText } from "~/domain/result-text";
import type { ScreeningResult } from "~/domain/screening-result";
import { clampMeterReading } from "~/screening/clamp-meter";
import { RefusedDocumentError } from "~/screening/refusal";
import { screen } from "~/screening/screen";
import type { FindingSummary, ScreenedText, TextAnswer, TextJob } from "./text-protocol";

/**
 * Reads, judges and screens a document's text in one go, so that a large one costs the thread that asks nothing but its
 * bytes. Never throws.
 */
export function answerTextJob(job: TextJob): TextAnswer {
  const read = readPlanDocument(job.text);
  if (!read.ok) {
    if ("notJson" in read) return { type: "not-json", reason: read.notJson };
    return { type: "refused", faults: read.faults };
  }
  try {
    if (job.type === "screen-text") return { type: "screened", screened: screenedText(read.document) };
    const { loop, loadCaseId } = job.request;
    return { type: "clamped", reading: clampMeterReading(read.document, loop, loadCaseId) };
  } catch (error) {
    if (error instanceof RefusedDocumentError) return { type: "refused", faults: error.faults };
    return { type: "failed", message: error instanceof Error ? error.message : String(error) };
  }
}

function screenedText(document: PlanDocument): ScreenedText {
  const result = screen(document);
  const { inputHash, engineVersion, verdict } = result;
  return {
    text: resultText(result),
    inputHash,
    engineVersion,
    verdict,
    findings: summaries(document, result),
  };
}

function summaries(document: PlanDocument, result: ScreeningResult): FindingSummary[] {
  const names = new Map(document.sensors.map(({ id, name }) => [id, name]));
  return result.sensors.flatMap((sensor) =>
    sensor.findings.map(
      ({
        field: _field,
        ellipse: _ellipse,
        contributions: _parts,
        uncertaintyMethod: _method,
        ...finding
      }) => ({
        ...finding,
        sensorId: sensor.id,
        sensorName: names.get(sensor.id) ?? sensor.id,
      }),
    ),
  );
}
