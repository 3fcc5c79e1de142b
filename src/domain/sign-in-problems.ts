/** Why a sign-in did not come about, as the sign-in page says it (`/sign-in?problem=…`). Closed. */
export const signInProblems = {
  "provider-unavailable":
    "The sign-in service of your organisation does not answer. Try again in a minute, or have a sign-in link sent to you by e-mail.",
  "provider-refused":
    "The sign-in service of your organisation did not confirm who you are. Try again; if it happens again, tell your admin.",
  declined: "The sign-in was broken off at the sign-in service. Start again when you are ready.",
  expired:
    "This sign-in took longer than ten minutes, was begun in another browser, or has been completed already. Start again.",
  "unknown-person":
    "The sign-in service knows you, but no organisation here does. Ask an admin of your organisation to add you.",
  "link-unusable":
    "This sign-in link is not valid. Copied links are often cut short; use the button in the e-mail, or have a new link sent.",
  "link-expired": "This sign-in link is older than ten minutes. Have a new one sent.",
  "link-used": "This sign-in link has been used already; each works once. Have a new one sent.",
  "address-unusable": "That is not an e-mail address. Check it and try again.",
  "too-many-attempts": "Too many attempts in a short time. Wait a little and try again.",
} as const satisfies Record<string, string>;

export type SignInProblem = keyof typeof signInProblems;

/** The text for the `problem` of an address; null when it names none. */
export function signInProblemText(problem: string | null): string | null {
  return problem !== null && Object.hasOwn(signInProblems, problem)
    ? signInProblems[problem as SignInProblem]
    : null;
}
