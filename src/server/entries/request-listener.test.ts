import { createServer, request, type IncomingMessage, type RequestListener, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { afterEach, expect, test } from "vitest";
import { drain } from "./drain";
import { createRequestListener } from "./request-listener";

let server: Server;

async function start(handler: RequestListener, options = {}): Promise<number> {
  const defaults = { appOrigin: "https://plans.example", trustProxy: false, maxBodyBytes: 1000 };
  server = createServer(createRequestListener({ handler, ...defaults, ...options }));
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  return (server.address() as AddressInfo).port;
}

afterEach(() => {
  server.closeAllConnections();
  server.close();
});

interface Sent {
  path?: string;
  headers?: Record<string, string>;
  body?: Buffer[];
}

function send(port: number, { path = "/", headers = {}, body = [] }: Sent) {
  return new Promise<{ status: number; headers: IncomingMessage["headers"]; text: string }>(
    (resolve, reject) => {
      const method = body.length > 0 ? "POST" : "GET";
      const sent = request({ port, host: "127.0.0.1", path, method, headers }, (answer) => {
        let text = "";
        answer.on("data", (part: Buffer) => (text += part.toString()));
        answer.on("end", () => resolve({ status: answer.statusCode ?? 0, headers: answer.headers, text }));
      });
      sent.on("error", reject);
      for (const part of body) sent.write(part);
      sent.end();
    },
  );
}

const echo: RequestListener = (incoming, response) => response.end(JSON.stringify(incoming.headers));
const count: RequestListener = (incoming, response) => {
  let sizeBytes = 0;
  incoming.on("data", (part: Buffer) => (sizeBytes += part.length));
  incoming.on("end", () => response.end(String(sizeBytes)));
};

test("files get the security headers; a page's own policy replaces the files'", async () => {
  const port = await start((incoming, response) => {
    if (incoming.url === "/page")
      response.writeHead(200, { "content-security-policy": "default-src 'self'" });
    response.end();
  });
  const { headers } = await send(port, { path: "/_assets/a.js" });
  expect(headers).toMatchObject({ "x-content-type-options": "nosniff", "referrer-policy": "same-origin" });
  expect(headers["strict-transport-security"]).toContain("max-age=31536000");
  expect(headers["content-security-policy"]).toContain("frame-ancestors 'none'");
  expect((await send(port, { path: "/page" })).headers["content-security-policy"]).toBe("default-src 'self'");
});

test("strict transport security is promised on https only", async () => {
  const port = await start(echo, { appOrigin: "http://127.0.0.1:4810" });
  expect((await send(port, {})).headers["strict-transport-security"]).toBeUndefined();
});

test("forwarded headers are a stranger's word unless the proxy is ours", async () => {
  const headers = {
    "X-Forwarded-For": "1.2.3.4",
    Forwarded: "for=1.2.3.4",
    "X-Real-IP": "1.2.3.4",
    "X-Other": "stays",
  };
  const text = (await send(await start(echo), { headers })).text;
  expect(text).not.toContain("1.2.3.4");
  expect(text).toContain("stays");
  server.close();
  expect((await send(await start(echo, { trustProxy: true }), { headers })).text).toContain("1.2.3.4");
});

test.each(["/_image?href=x", "/_image/", "/_server-islands/A", "/%5fimage", "//_image", "/_IMAGE"])(
  "%s is closed",
  async (path) => {
    const port = await start(echo);
    expect((await send(port, { path })).status).toBe(404);
  },
);

test("an address that is no text is refused", async () => {
  expect((await send(await start(echo), { path: "/%E0%A4%A" })).status).toBe(400);
});

test("a body over the limit is refused, whether its length is stated or not", async () => {
  const port = await start(count);
  const body = [Buffer.alloc(600), Buffer.alloc(600)];
  expect((await send(port, { body, headers: { "content-length": "1200" } })).status).toBe(413);
  const chunked = { "transfer-encoding": "chunked" };
  expect((await send(port, { body, headers: chunked })).status).toBe(413);
  const within = await send(port, { body: [Buffer.alloc(1000)], headers: chunked });
  expect(within).toMatchObject({ status: 200, text: "1000" });
});

test("draining lets a running request finish and takes no new ones", async () => {
  let finish = () => {};
  const running = new Promise<void>((resolve) => {
    void start((_incoming, response) => {
      finish = () => response.end("finished");
      resolve();
    }).then((port) => {
      answer = send(port, {});
    });
  });
  let answer: ReturnType<typeof send> | undefined;
  await running;
  const { port } = server.address() as AddressInfo;
  const drained = drain(server, 10_000);
  await expect(send(port, {})).rejects.toThrow(/ECONNREFUSED/);
  finish();
  expect((await answer)?.text).toBe("finished");
  await drained;
});

test("draining cuts off a request that does not end in time", async () => {
  const port = await start(() => {});
  const arrived = new Promise((resolve) => server.once("request", resolve));
  const answer = expect(send(port, {})).rejects.toThrow();
  await arrived;
  await drain(server, 20);
  await answer;
});
