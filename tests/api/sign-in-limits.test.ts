import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { limitRate } from "../../src/server/auth/rate-limit";
import { db } from "../../src/server/db/client";
import { rateLimits } from "../../src/server/db/schema/people";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;

beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.close());

const start = (address: string, headers: Record<string, string> = {}) =>
  app.visitor(address).request(`${app.origin}/api/sign-in/start`, { headers });
const ask = (address: string, email: string) =>
  app.visitor(address).request(`${app.origin}/api/sign-in/link`, {
    method: "POST",
    headers: { "content-type": "application/json" },
    body: JSON.stringify({ email }),
  });
const useUp = (address: string) =>
  app.visitor(address).request(`${app.origin}/api/sign-in/token`, {
    method: "POST",
    headers: { "content-type": "application/json" },
    body: JSON.stringify({ token: "guessed" }),
  });

async function inTurn<T>(count: number, attempt: (index: number) => Promise<T>): Promise<T[]> {
  const answers: T[] = [];
  for (let index = 0; index < count; index += 1) answers.push(await attempt(index));
  return answers;
}
const statuses = (answers: Response[]) => answers.map((answer) => answer.status);
const waitOf = (answer: Response) => Number(answer.headers.get("retry-after"));

describe("signing in from one address", () => {
  it("is possible ten times a minute, by whatever way, and then has to wait", async () => {
    const address = "192.0.2.1";
    expect(statuses(await inTurn(5, () => start(address)))).toEqual(new Array(5).fill(303));
    expect(statuses(await inTurn(5, () => useUp(address)))).toEqual(new Array(5).fill(303));
    for (const answer of [await start(address), await useUp(address), await ask(address, "a@b.example")]) {
      expect(answer.status).toBe(429);
      expect(waitOf(answer)).toBeGreaterThan(0);
      expect(waitOf(answer)).toBeLessThanOrEqual(120);
      expect(await answer.json()).toMatchObject({ error: { code: "rate.exceeded" } });
    }
    expect((await start("192.0.2.2")).status).toBe(303);
  });

  it("shows a browser the sign-in page", async () => {
    const address = "192.0.2.3";
    await inTurn(10, () => start(address));
    const refused = await start(address, { accept: "text/html,*/*" });
    expect([refused.status, refused.headers.get("location")]).toEqual([
      303,
      "/sign-in?problem=too-many-attempts",
    ]);
    expect(waitOf(refused)).toBeGreaterThan(0);
    expect(refused.headers.getSetCookie()).toEqual([]);
  });

  it("counts every one of many at the same time", async () => {
    const address = "192.0.2.4";
    const answers = await Promise.all(Array.from({ length: 40 }, () => start(address)));
    expect(answers.filter((answer) => answer.status === 303)).toHaveLength(10);
  });

  it("is not made easier by what a client says of its own address", async () => {
    const proxied = (claimed: string) => start(`${claimed}, 192.0.2.5`);
    const answers = await inTurn(11, (index) => proxied(`198.51.100.${String(index)}`));
    expect(answers.at(-1)?.status).toBe(429);
  });

  it("counts a whole IPv6 network as one", async () => {
    const answers = await inTurn(11, (index) => start(`2001:db8:0:1::${String(index)}`));
    expect(answers.at(-1)?.status).toBe(429);
    expect((await start("2001:db8:0:2::1")).status).toBe(303);
  });
});

describe("coming back from the provider", () => {
  it("may be tried ten times with one sign-in", async () => {
    const visitor = app.visitor("192.0.2.6");
    await visitor.request(`${app.origin}/api/sign-in/start`);
    const guess = () => visitor.request(`${app.origin}/api/sign-in/return?code=x&state=guessed`);
    expect(statuses(await inTurn(10, guess))).toEqual(new Array(10).fill(303));
    expect((await guess()).status).toBe(429);
  });
});

describe("sign-in mails", () => {
  it("go to one address five times an hour, however it is written and from wherever it is asked", async () => {
    const spellings = ["one@farnwick.example", "ONE@farnwick.example", " one@Farnwick.example "];
    const answers = await inTurn(6, (index) =>
      ask(`192.0.2.${String(100 + index)}`, spellings[index % spellings.length] ?? ""),
    );
    expect(statuses(answers)).toEqual([202, 202, 202, 202, 202, 429]);
    const refused = answers.at(-1);
    expect(refused && waitOf(refused)).toBeGreaterThan(60);
    expect((await ask("192.0.2.110", "other@farnwick.example")).status).toBe(202);
  });

  it("are possible again an hour later, and not before the wait is over", async () => {
    const now = new Date("2030-01-01T10:05:00Z");
    const tryAt = (s: number) =>
      limitRate("sign-in-mail", "later@farnwick.example", new Date(now.getTime() + s * 1000));
    await inTurn(5, () => tryAt(0));
    const refusal: unknown = await tryAt(0).catch((error: unknown) => error);
    const { retryAfterS } = (refusal as { detail: { retryAfterS: number } }).detail;
    await expect(tryAt(retryAfterS - 2)).rejects.toThrow("Too many attempts");
    await expect(tryAt(retryAfterS)).resolves.toBeUndefined();
  });
});

it("keeps no address, only hashes", async () => {
  await ask("192.0.2.120", "hidden@farnwick.example");
  const buckets = (await db().select({ bucket: rateLimits.bucket }).from(rateLimits)).map(
    (row) => row.bucket,
  );
  expect(buckets.length).toBeGreaterThan(0);
  for (const bucket of buckets) expect(bucket).toMatch(/^sign-in(-return|-mail)?:[0-9a-f]{64}$/);
});
