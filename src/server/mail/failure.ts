import { oneLine } from "~/domain/one-line";

/** Refusals of this sender, recipient or message; everything else is the connection's or the configuration's fault. */
const messageCodes = new Set(["EENVELOPE", "EMESSAGE"]);
const lastAnswerMaxLength = 500;

export interface Failure {
  /** True where trying again cannot help: a 5xx answer (RFC 5321, 4.2.1), or a message that cannot be sent at all. */
  isFinal: boolean;
  /** What the server said, fit to be kept and shown. */
  answer: string;
}

/** What an error of the transport means for the message. */
export function judgeFailure(error: unknown): Failure {
  if (!(error instanceof Error)) return { isFinal: false, answer: "The message could not be sent." };
  // The transport gives every error of its own a code; one without was thrown by our checks and would be again.
  const code = "code" in error && typeof error.code === "string" ? error.code : "EMESSAGE";
  const status =
    "responseCode" in error && typeof error.responseCode === "number" ? error.responseCode : null;
  const isFinal = messageCodes.has(code) && (status === null || status >= 500);
  const response = "response" in error && typeof error.response === "string" ? error.response : error.message;
  return { isFinal, answer: keptAnswer(response) };
}

/** A server's answer in one line of bounded length, with addresses taken out. */
export function keptAnswer(answer: string): string {
  return oneLine(answer.replace(/[^\s<>"'(),:;]+@[^\s<>"'(),:;]+/gu, "(address)")).slice(
    0,
    lastAnswerMaxLength,
  );
}
