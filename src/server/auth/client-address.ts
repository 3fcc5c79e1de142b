import { isIPv4, isIPv6 } from "node:net";
import type { APIContext } from "astro";
import { env } from "../env";

/**
 * The network that a request is counted under: an IPv4 address or the first 64 bits of an IPv6 one, since a household
 * or a host holds a whole /64.
 */
export function clientNetwork(context: Pick<APIContext, "request" | "clientAddress">): string {
  const forwardedFor = context.request.headers.get("x-forwarded-for");
  if (forwardedFor === null) return networkOf(context.clientAddress);
  // Only the proxy's own entry, the last one, is not the client's word; without a proxy of ours nothing in it counts.
  return env().trustProxy ? networkOf(forwardedFor.split(",").at(-1)?.trim() ?? "") : "unverified";
}

export function networkOf(address: string): string {
  const plain = address.replace(/^::ffff:(?=\d+\.)/i, "").replace(/%.*$/, "");
  if (isIPv4(plain)) return plain;
  if (!isIPv6(plain)) return "unverified";
  const [head = "", tail] = plain.toLowerCase().split("::");
  const groups = head === "" ? [] : head.split(":");
  if (tail !== undefined) {
    const after = tail === "" ? [] : tail.split(":");
    while (groups.length + after.length < 8) groups.push("0");
    groups.push(...after);
  }
  return `${groups
    .slice(0, 4)
    .map((group) => group.replace(/^0+(?=.)/, ""))
    .join(":")}::/64`;
}
