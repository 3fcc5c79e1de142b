import { errorBody, type Refusal } from "~/domain/errors";

/** Headers of every answer that the application itself makes; Astro adds the pages' Content-Security-Policy. */
export const securityHeaders: Readonly<Record<string, string>> = {
  "X-Content-Type-Options": "nosniff",
  // With no-referrer browsers post forms with "Origin: null", which is refused as foreign.
  "Referrer-Policy": "same-origin",
  "X-Frame-Options": "DENY",
  "Cross-Origin-Opener-Policy": "same-origin",
  "Cross-Origin-Resource-Policy": "same-origin",
  "Permissions-Policy": "camera=(self), geolocation=(), microphone=()",
};

/** The policy of answers that are no pages: nothing in them may load or run. */
export const inertContentSecurityPolicy = "default-src 'none'; frame-ancestors 'none'; sandbox";

const inertHeaders = { "Content-Security-Policy": inertContentSecurityPolicy, "Cache-Control": "no-store" };

export function json(body: unknown, status = 200, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(body), {
    status,
    headers: { "Content-Type": "application/json; charset=utf-8", ...inertHeaders, ...headers },
  });
}

export function noContent(headers: Record<string, string> = {}): Response {
  return new Response(null, { status: 204, headers: { ...inertHeaders, ...headers } });
}

/** Goes on to a path of this application with GET. */
export function seeOther(path: string, headers: Record<string, string> = {}): Response {
  return new Response(null, { status: 303, headers: { Location: path, ...inertHeaders, ...headers } });
}

export function refused(refusal: Refusal): Response {
  const retryAfterS = refusal.detail["retryAfterS"];
  return json(
    errorBody(refusal),
    refusal.status,
    typeof retryAfterS === "number" ? { "Retry-After": String(retryAfterS) } : {},
  );
}

interface FileOptions {
  mediaType: string;
  /** Offered as a download under this name; shown in place when left out. */
  fileName?: string;
  cacheControl?: string;
  /** Default: nothing in it may load or run. */
  contentSecurityPolicy?: string;
}

export function file(
  body: string | Uint8Array<ArrayBuffer> | ReadableStream,
  options: FileOptions,
): Response {
  const { mediaType, fileName, cacheControl, contentSecurityPolicy } = options;
  return new Response(body, {
    headers: {
      "Content-Type": mediaType,
      ...inertHeaders,
      ...(cacheControl !== undefined && { "Cache-Control": cacheControl }),
      ...(contentSecurityPolicy !== undefined && { "Content-Security-Policy": contentSecurityPolicy }),
      ...(fileName !== undefined && { "Content-Disposition": contentDisposition(fileName) }),
    },
  });
}

/** RFC 6266 with the plain name for old clients and the exact one in UTF-8. */
export function contentDisposition(fileName: string): string {
  const plain = fileName.replace(/[^\w. -]/g, "_");
  return `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(fileName).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`)}`;
}
