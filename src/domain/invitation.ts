import type { DeliveryState } from "./delivery";

/** An invitation's link works for this long after it was sent. */
export const invitationLifetimeMs = 7 * 24 * 60 * 60_000;

/** waiting: its mail is still to be sent; open: sent and its link works; lapsed: its links have run out; the others end it. */
export const invitationStates = [
  "waiting",
  "open",
  "not-delivered",
  "lapsed",
  "accepted",
  "withdrawn",
] as const;
export type InvitationState = (typeof invitationStates)[number];

interface Course {
  acceptedAt: Date | null;
  withdrawnAt: Date | null;
  /** Of the newest mail; null where there is none any more. */
  deliveryState: DeliveryState | null;
  /** Until when the newest link works. */
  linkExpiresAt: Date | null;
}

export function invitationState(course: Course, now: Date): InvitationState {
  if (course.acceptedAt !== null) return "accepted";
  if (course.withdrawnAt !== null) return "withdrawn";
  if (course.deliveryState === "waiting") return "waiting";
  if (course.deliveryState === "failed") return "not-delivered";
  return course.linkExpiresAt !== null && course.linkExpiresAt > now ? "open" : "lapsed";
}

/** Why an invitation was not accepted, as its page says it (`/invitations/accept?problem=…`). Closed. */
export const invitationProblems = {
  unusable:
    "This invitation link is not valid. Copied links are often cut short; use the button in the e-mail, or ask for a new invitation.",
  lapsed: "This invitation is older than seven days. Ask whoever invited you to have it sent again.",
  withdrawn: "This invitation has been withdrawn. Ask whoever invited you.",
  accepted: "This invitation has been accepted already. Sign in instead.",
  "already-member": "There is already a member with this address. Sign in instead.",
  "identity-taken":
    "The sign-in service knows you as somebody who is a member of this organisation already. Sign in instead.",
  "signed-in-as-member":
    "In this browser a member of this organisation is signed in. The invitation is for somebody else: sign out first, or open it in the browser of whoever it is for.",
  expired:
    "Accepting took longer than ten minutes or was begun in another browser. Open the invitation again.",
} as const satisfies Record<string, string>;

export type InvitationProblem = keyof typeof invitationProblems;

/** The text for the `problem` of an address; null when it names none. */
export function invitationProblemText(problem: string | null): string | null {
  return problem !== null && Object.hasOwn(invitationProblems, problem)
    ? invitationProblems[problem as InvitationProblem]
    : null;
}
