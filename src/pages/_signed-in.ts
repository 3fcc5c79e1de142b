import type { Member, Principal } from "~/domain/permissions";

/** The member whom the middleware has let through. @throws Error where a page forgot to state its permission */
export function signedIn(principal: Principal): Member {
  if (principal.kind !== "member") throw new Error("This page was reached without a session.");
  return principal;
}
