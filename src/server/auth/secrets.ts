import { timingSafeEqual } from "node:crypto";
import { sha256 } from "@oslojs/crypto/sha2";
import { encodeBase64urlNoPadding, encodeHexLowerCase } from "@oslojs/encoding";

const tokenBytes = 32;

/** 256 random bits, base64url. */
export const newToken = (): string =>
  encodeBase64urlNoPadding(crypto.getRandomValues(new Uint8Array(tokenBytes)));

/** What is stored in a token's place: SHA-256 in lower-case hexadecimal. */
export const hashOf = (text: string): string => encodeHexLowerCase(sha256(new TextEncoder().encode(text)));

/** Compares in a time that does not tell how much of the two is alike. */
export const sameSecret = (a: string, b: string): boolean =>
  timingSafeEqual(sha256(new TextEncoder().encode(a)), sha256(new TextEncoder().encode(b)));
