import type { ClampMeterRequest } from "~/domain/clamp-meter";
import type { DocumentFault } from "~/domain/plan-document/faults";
import type { Finding, Verdict } from "~/domain/screening-result";
import type { ClampReading } from "~/screening/clamp-meter";

/** What the server's worker is asked to do with a document that nobody has read yet. */
export type TextJob =
  | { type: "screen-text"; text: string }
  | { type: "clamp-meter-text"; text: string; request: ClampMeterRequest };

/** A finding without what only its detail shows. */
export type FindingSummary = Omit<Finding, "field" | "ellipse" | "contributions" | "uncertaintyMethod"> & {
  sensorId: string;
  sensorName: string;
};

/** A screening's result as text, with what is kept beside it. */
export interface ScreenedText {
  text: string;
  inputHash: string;
  engineVersion: string;
  verdict: Verdict;
  findings: FindingSummary[];
}

/** `refused` with every fault; `not-json` where the text cannot be read at all; `failed` for what nobody foresaw. */
export type TextAnswer =
  | { type: "screened"; screened: ScreenedText }
  | { type: "clamped"; reading: ClampReading }
  | { type: "refused"; faults: DocumentFault[] }
  | { type: "not-json"; reason: string }
  | { type: "failed"; message: string };

export type { ClampReading } from "~/screening/clamp-meter";
