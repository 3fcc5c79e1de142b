import { expect, test } from "vitest";
import { signingKey } from "./canonical-request";
import { crc32c } from "./checksums";
import { decodeChunkedBody } from "./chunked-body";

// The worked example of "Signature Calculations for the Authorization Header: Transferring Payload in
// Multiple Chunks" in the Amazon S3 API reference (from memory): 66 560 letters "a" in chunks of 65 536 and 1 024.
const scope = { date: "20130524", region: "us-east-1" };
const authentication = {
  payloadHash: "STREAMING-AWS4-HMAC-SHA256-PAYLOAD",
  signature: "4f232c4386841ef735655705268965c44a0e4690baa4adea153f7db9fa80a0a9",
  key: signingKey("wJalrXUtnFEMI/K7MDENG/bPxRfiCYEXAMPLEKEY", scope),
  timestamp: "20130524T000000Z",
  scope,
};
const body = (letter: string): Buffer =>
  Buffer.from(
    [
      "10000;chunk-signature=ad80c730a21e5b8d04586a2213dd63b9a0e99e0e2307b0ade35a65485a288648",
      letter.repeat(65_536),
      "400;chunk-signature=0055627c9e194cb4542bae2aa5492e3c1575bbb81b612b7d234b86a503ef5497",
      "a".repeat(1024),
      "0;chunk-signature=b6c6ea8a5354eaf15b3cb7646744f4275b71ea724fed81ceb9323e279d449df9",
      "",
      "",
    ].join("\r\n"),
  );

test("decodes the published example with its three signatures", () => {
  expect(decodeChunkedBody(body("a"), authentication).body.toString()).toBe("a".repeat(66_560));
});

test("refuses a changed chunk and a body cut short", () => {
  expect(() => decodeChunkedBody(body("b"), authentication)).toThrow(/signature of a chunk/);
  expect(() => decodeChunkedBody(body("a").subarray(0, 66_000), authentication)).toThrow(/number of bytes/);
});

test("CRC-32C of the digits 1 to 9 (RFC 3720's check value, from memory)", () => {
  expect(crc32c(Buffer.from("123456789"))).toBe(0xe3069283);
});
