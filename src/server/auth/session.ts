import type { AstroCookies } from "astro";
import type { Principal } from "~/domain/permissions";

/** What the request's session cookie stands for; anonymous when there is none or it has ended. */
export declare function principalOf(
  cookies: AstroCookies,
): Promise<{ principal: Principal; sessionId: string | null; authenticatedAt: Date | null }>;
