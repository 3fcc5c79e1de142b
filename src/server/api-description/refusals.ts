import { statusByErrorCode, type ErrorCode } from "~/domain/errors";
import type { Action } from "~/domain/permissions";
import { permissions } from "~/domain/permissions";
import type { EndpointDefinition } from "../http/endpoint-definition";

const isSafe = (method: string): boolean => method === "GET";

/** Every refusal that an endpoint may give: what its kind brings with it, and its own. */
export function refusalsOf(
  method: string,
  hasPathParameters: boolean,
  definition: EndpointDefinition,
): ErrorCode[] {
  const { action, body, query, ownBody, refusals = [] } = definition;
  const codes = new Set<ErrorCode>(refusals);
  const { allow } = permissions[action];
  if (allow !== "anyone") codes.add("sign-in.required");
  if (allow !== "anyone" && allow !== "member") codes.add("permission.denied");
  if (hasPathParameters) codes.add("not-found");
  if (!isSafe(method)) codes.add("request.foreign-origin");
  if (body !== undefined || ownBody !== undefined) codes.add("request.too-large");
  if (body !== undefined || ownBody?.schema !== undefined) {
    codes.add("request.malformed");
    codes.add("request.wrong-type");
  }
  if (body !== undefined || query !== undefined) codes.add("input.refused");
  codes.add("internal");
  return [...codes];
}

/** Codes by their status, ascending. */
export function byStatus(codes: readonly ErrorCode[]): [number, ErrorCode[]][] {
  const groups = new Map<number, ErrorCode[]>();
  for (const code of codes) {
    const status = statusByErrorCode[code];
    groups.set(status, [...(groups.get(status) ?? []), code]);
  }
  return [...groups].sort(([a], [b]) => a - b);
}

/** Who may, in words. */
export function allowedTo(action: Action): string {
  const { allow } = permissions[action];
  if (allow === "anyone") return "Open to anyone; no sign-in is needed.";
  if (allow === "member") return "For any signed-in person.";
  const roles: readonly string[] = allow;
  const listed =
    roles.length > 1 ? `${roles.slice(0, -1).join(", ")} or ${roles.at(-1) ?? ""}` : roles.join();
  return `For members with the role ${listed}; what belongs to another organisation or site answers as if it were not there.`;
}
