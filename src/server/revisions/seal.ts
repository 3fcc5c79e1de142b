import { sha256 } from "@oslojs/crypto/sha2";
import { encodeHexLowerCase } from "@oslojs/encoding";

/** SHA-256 of a text's UTF-8 bytes, lower-case hexadecimal. */
export const sha256Of = (text: string): string => encodeHexLowerCase(sha256(new TextEncoder().encode(text)));

interface Sealed {
  documentSha256: string;
  /** Null for a plan on a blank grid. */
  drawingSha256: string | null;
  resultSha256: string;
  engineVersion: string;
}

/** One hash over all that a revision froze: of four lines "name value", each ended by a line feed. */
export const sealOf = ({ documentSha256, drawingSha256, resultSha256, engineVersion }: Sealed): string =>
  sha256Of(
    `document ${documentSha256}\ndrawing ${drawingSha256 ?? "none"}\nresult ${resultSha256}\nengine ${engineVersion}\n`,
  );
