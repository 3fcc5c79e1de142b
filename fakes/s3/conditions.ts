import type { IncomingHttpHeaders } from "node:http";
import { S3Error } from "./errors";
import type { ObjectRecord } from "./object-store";

/** If-None-Match: * and If-Match on a write. */
export function checkWriteConditions(headers: IncomingHttpHeaders, existing: ObjectRecord | undefined): void {
  const failed = (condition: string) =>
    new S3Error("PreconditionFailed", "At least one of the pre-conditions you specified did not hold", {
      Condition: condition,
    });
  const noneMatch = headers["if-none-match"];
  if (noneMatch !== undefined && noneMatch !== "*") {
    throw new S3Error(
      "NotImplemented",
      "A header you provided implies functionality that is not implemented",
      {
        Header: "If-None-Match",
      },
    );
  }
  if (noneMatch === "*" && existing) throw failed("If-None-Match");
  const match = headers["if-match"];
  if (match === undefined) return;
  if (!existing) throw new S3Error("NoSuchKey", "The specified key does not exist.");
  if (!matches(match, existing.etag)) throw failed("If-Match");
}

/** Whether a read is answered 304; throws when If-Match does not hold. */
export function isNotModified(headers: IncomingHttpHeaders, record: ObjectRecord): boolean {
  const match = headers["if-match"];
  if (match !== undefined && !matches(match, record.etag)) {
    throw new S3Error("PreconditionFailed", "At least one of the pre-conditions you specified did not hold", {
      Condition: "If-Match",
    });
  }
  const noneMatch = headers["if-none-match"];
  return noneMatch !== undefined && matches(noneMatch, record.etag);
}

const matches = (condition: string, etag: string): boolean =>
  condition === "*" || condition.split(",").some((one) => unquoted(one) === unquoted(etag));

const unquoted = (etag: string): string => etag.trim().replaceAll('"', "");

export interface ByteRange {
  first: number;
  /** Inclusive. */
  last: number;
}

/** One range of RFC 9110; anything else is ignored, as S3 does, and a range past the end is refused. */
export function parseRange(header: string | undefined, sizeBytes: number): ByteRange | undefined {
  const match = /^bytes=(\d*)-(\d*)$/.exec(header ?? "");
  if (!match || (match[1] === "" && match[2] === "")) return undefined;
  const [, from = "", to = ""] = match;
  const first = from === "" ? Math.max(0, sizeBytes - Number(to)) : Number(from);
  const last = from === "" || to === "" ? sizeBytes - 1 : Math.min(Number(to), sizeBytes - 1);
  if (first >= sizeBytes || (from === "" && Number(to) === 0)) {
    throw new S3Error("InvalidRange", "The requested range is not satisfiable", {
      RangeRequested: header ?? "",
      ActualObjectSize: String(sizeBytes),
    });
  }
  return last < first ? undefined : { first, last };
}
