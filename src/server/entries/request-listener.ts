import type { IncomingMessage, RequestListener, ServerResponse } from "node:http";
import { securityHeaders } from "../http/respond";

export interface ListenerOptions {
  /** Astro's handler of pages, endpoints and files. */
  handler: RequestListener;
  appOrigin: string;
  /** Whether X-Forwarded-* comes from a proxy of ours. */
  trustProxy: boolean;
  maxBodyBytes?: number;
}

const defaultMaxBodyBytes = 30_000_000;

/** For files; pages and endpoints replace it by their own. A worker runs under its script's policy. */
const filePolicy = [
  "default-src 'none'",
  "script-src 'self' 'wasm-unsafe-eval'",
  "worker-src 'self' blob:",
  "connect-src 'self'",
  "img-src 'self'",
  "style-src 'self'",
  "font-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
].join("; ");

const forwardedHeader = /^(forwarded$|x-forwarded-|x-real-ip$)/;

/** Addresses of Astro's own that this application has no use for. */
const closedPaths = /^\/(_image|_server-islands)(\/|$)/i;

/** What stands between the network and Astro's handler: limits, headers, closed doors. */
export function createRequestListener(options: ListenerOptions): RequestListener {
  const maxBodyBytes = options.maxBodyBytes ?? defaultMaxBodyBytes;
  return (request, response) => {
    setSecurityHeaders(response, options.appOrigin);
    if (!options.trustProxy) stripForwardedHeaders(request);
    const path = decodedPath(request);
    if (path === undefined) return refuse(response, 400, "The address is not valid.");
    if (closedPaths.test(path)) return refuse(response, 404, "There is nothing here.");
    if (Number(request.headers["content-length"] ?? 0) > maxBodyBytes) {
      return refuse(response, 413, `The request is larger than ${maxBodyBytes / 1e6} MB.`);
    }
    limitBody(request, response, maxBodyBytes);
    options.handler(request, response);
  };
}

function setSecurityHeaders(response: ServerResponse, appOrigin: string): void {
  for (const [name, value] of Object.entries(securityHeaders)) response.setHeader(name, value);
  response.setHeader("Content-Security-Policy", filePolicy);
  if (appOrigin.startsWith("https:")) {
    response.setHeader("Strict-Transport-Security", "max-age=31536000; includeSubDomains");
  }
}

function stripForwardedHeaders(request: IncomingMessage): void {
  for (const name of Object.keys(request.headers)) {
    if (forwardedHeader.test(name)) Reflect.deleteProperty(request.headers, name);
  }
}

/** The path as the router will read it: decoded, without doubled slashes. */
function decodedPath(request: IncomingMessage): string | undefined {
  try {
    return decodeURI((request.url ?? "/").split(/[?#]/)[0] ?? "/").replace(/\/{2,}/g, "/");
  } catch {
    return undefined;
  }
}

/** A body without a stated length is counted while it is read; endpoints have narrower limits of their own. */
function limitBody(request: IncomingMessage, response: ServerResponse, maxBodyBytes: number): void {
  if (request.headers["transfer-encoding"] === undefined) return;
  let sizeBytes = 0;
  const push = request.push.bind(request);
  request.push = (chunk: unknown, encoding?: BufferEncoding) => {
    if (chunk instanceof Uint8Array) sizeBytes += chunk.length;
    if (sizeBytes <= maxBodyBytes) return push(chunk, encoding);
    if (!response.headersSent) refuse(response, 413, `The request is larger than ${maxBodyBytes / 1e6} MB.`);
    request.destroy();
    return false;
  };
}

function refuse(response: ServerResponse, status: number, message: string): void {
  response.writeHead(status, {
    "Content-Type": "text/plain; charset=utf-8",
    "Cache-Control": "no-store",
    // What is left of the request's body is not read.
    ...(status === 413 ? { Connection: "close" } : {}),
  });
  response.end(message);
}
