/// <reference types="astro/client" />
import type { Refusal } from "~/domain/errors";
import type { Principal } from "~/domain/permissions";
import type { Scope } from "~/server/auth/scope";

declare global {
  namespace App {
    interface Locals {
      /** Short random id that stands in the log line and in the answer's X-Request-Id. */
      requestId: string;
      principal: Principal;
      /** Hash of the session token, null without a session. */
      sessionId: string | null;
      /** When the person last proved who they are; null without a session. */
      authenticatedAt: Date | null;
      /** What the path's parameters name, once the guard has found them. */
      scope: Scope;
      /** Why the page could not be shown; the error pages say it. */
      refusal?: Refusal;
    }
  }
}
