import { Refusal } from "~/domain/errors";
import type { SignInProblem } from "~/domain/sign-in-problems";
import { seeOther } from "../http/respond";
import type { NextStep } from "./sign-in";

/** The sign-in page saying what went wrong. */
export const toSignInPage = (problem: SignInProblem, headers: Record<string, string> = {}): Response =>
  seeOther(`/sign-in?problem=${problem}`, headers);

export const goOnTo = (step: NextStep): Response =>
  "goTo" in step ? seeOther(step.goTo) : toSignInPage(step.problem);

/** Whether a person will look at the answer: a browser that follows a link or posts a form. */
export function isForPage(request: Request): boolean {
  const posted = request.headers.get("content-type")?.startsWith("application/x-www-form-urlencoded");
  return posted === true || (request.headers.get("accept") ?? "").includes("text/html");
}

/** Shows what `work` refuses on the sign-in page where somebody will look at it; scripts get the refusal itself. */
export async function orSignInPage(request: Request, work: () => Promise<Response>): Promise<Response> {
  try {
    return await work();
  } catch (error) {
    if (!(error instanceof Refusal) || !isForPage(request)) throw error;
    if (error.code === "input.refused") return toSignInPage("address-unusable");
    if (error.code !== "rate.exceeded") throw error;
    return toSignInPage("too-many-attempts", { "Retry-After": String(error.detail["retryAfterS"]) });
  }
}
