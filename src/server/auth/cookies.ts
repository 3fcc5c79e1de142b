import type { AstroCookies } from "astro";
import { env } from "../env";

const isHttps = (): boolean => env().appOrigin.startsWith("https:");

/** The prefix makes browsers insist on Secure, Path=/ and no Domain; it does not work on plain loopback. */
const prefixed = (name: string): string => (isHttps() ? `__Host-${name}` : name);

export const sessionCookieName = (): string => prefixed("stillneedle-session");
export const pendingCookieName = (): string => prefixed("stillneedle-sign-in");

export const readCookie = (cookies: AstroCookies, name: string): string | null =>
  cookies.get(name)?.value ?? null;

/** SameSite=Lax, because the way back from the sign-in provider is a navigation from another site. */
export function setCookie(cookies: AstroCookies, name: string, token: string, maxAgeMs: number): void {
  cookies.set(name, token, {
    httpOnly: true,
    secure: isHttps(),
    sameSite: "lax",
    path: "/",
    maxAge: Math.floor(maxAgeMs / 1000),
  });
}

export function removeCookie(cookies: AstroCookies, name: string): void {
  cookies.delete(name, { httpOnly: true, secure: isHttps(), sameSite: "lax", path: "/" });
}
