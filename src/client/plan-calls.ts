import { z } from "zod";
import { savedAnswer, workingCopyAnswer } from "~/domain/answers/plans";
import { screenedAnswer } from "~/domain/answers/screenings";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { ApiRefusal, callApi } from "./api";
import type { PutOutcome, TheirSave } from "./autosave";

export const queryKeys = {
  document: (planId: string) => ["plans", planId, "document"] as const,
};

const documentSchema = z.unknown().transform((json, context): PlanDocument => {
  const parsed = parsePlanDocument(json);
  if (parsed.ok) return parsed.document;
  const [first] = parsed.faults;
  context.addIssue({
    code: "custom",
    message: `the plan document can't be read: ${first?.path ?? "document"}: ${first?.message ?? "malformed"}`,
  });
  return z.NEVER;
});

const savedPlanSchema = workingCopyAnswer.extend({ document: documentSchema });

export type SavedPlan = TheirSave<PlanDocument>;

const plansPath = (planId: string): string => `/api/plans/${encodeURIComponent(planId)}`;

const someone = "somebody else";

export async function getPlan(planId: string, signal?: AbortSignal): Promise<SavedPlan> {
  const saved = await callApi(`${plansPath(planId)}/document`, savedPlanSchema, signal ? { signal } : {});
  return { ...saved, savedByName: saved.savedByName ?? someone };
}

/** Saves on top of `baseVersion`. A newer version on the server is an outcome, not an error. */
export async function putPlan(
  planId: string,
  baseVersion: number,
  document: PlanDocument,
): Promise<PutOutcome<PlanDocument>> {
  try {
    const answer = await callApi(`${plansPath(planId)}/document`, savedAnswer, {
      method: "PUT",
      body: { baseVersion, document },
    });
    return { kind: "saved", ...answer };
  } catch (refused) {
    if (!(refused instanceof ApiRefusal) || refused.code !== "document.conflict") throw refused;
    const theirs = savedPlanSchema.parse(refused.detail);
    return { kind: "conflict", theirs: { ...theirs, savedByName: theirs.savedByName ?? someone } };
  }
}

/** Screens the saved working copy at `version`, stores the result and tells its page. */
export const postScreening = (planId: string, version: number): Promise<z.output<typeof screenedAnswer>> =>
  callApi(`${plansPath(planId)}/screenings`, screenedAnswer, { method: "POST", body: { version } });

export const drawingUrl = (planId: string, drawingId: string): string =>
  `${plansPath(planId)}/drawings/${encodeURIComponent(drawingId)}`;

export const drawingsUrl = (planId: string): string => `${plansPath(planId)}/drawings`;
