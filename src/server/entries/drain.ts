import type { Server } from "node:http";

/** Takes no new requests and lets those that run finish, for `graceMs` at most. */
export function drain(server: Server, graceMs: number): Promise<void> {
  return new Promise((resolve) => {
    const cut = setTimeout(() => server.closeAllConnections(), graceMs);
    // Connections of requests that still run would else be kept for a next request.
    server.keepAliveTimeout = 1;
    server.close(() => {
      clearTimeout(cut);
      resolve();
    });
    server.closeIdleConnections();
  });
}
