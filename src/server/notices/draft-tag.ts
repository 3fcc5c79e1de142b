import { sha256 } from "@oslojs/crypto/sha2";
import { encodeHexLowerCase } from "@oslojs/encoding";
import type { Recipient } from "~/domain/notice";

/**
 * Stands for what a draft says: two planners who have it before them see whether the other has changed it meanwhile.
 * Saving the same again is no change.
 */
export function draftTagOf(coveringText: string, recipients: readonly Recipient[]): string {
  const listed = recipients
    .map(({ name, email }) => [email, name])
    .sort(([a = ""], [b = ""]) => (a < b ? -1 : 1));
  const bytes = new TextEncoder().encode(JSON.stringify([coveringText, listed]));
  return encodeHexLowerCase(sha256(bytes)).slice(0, 32);
}
