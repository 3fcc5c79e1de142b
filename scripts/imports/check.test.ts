import { expect, test } from "vitest";
import { checkImports } from "./check";

const check = (files: Record<string, string>) => checkImports(new Map(Object.entries(files)));
/** One import between two files, and nothing else. */
const between = (
  from: string,
  to: string,
  line: (path: string) => string = (path) => `import "${path}";`,
) => {
  const specifier = `~/${to.slice("src/".length).replace(/\.tsx?$/, "")}`;
  return check({ [from]: line(specifier), [to]: "export const x = 1;" });
};

test.each([
  ["src/field/segment.ts", "src/domain/units.ts"],
  ["src/screening/screen.ts", "src/field/segment.ts"],
  ["src/sheet/steps/trace.ts", "src/domain/plan.ts"],
  ["src/workers/node.ts", "src/screening/screen.ts"],
  ["src/client/api.ts", "src/workers/protocol.ts"],
  ["src/components/sheet/Sheet.tsx", "src/client/api.ts"],
  ["src/layouts/Page.astro", "src/components/ui/Header.astro"],
  ["src/server/plans/plans.ts", "src/server/db/queries/plans.ts"],
  ["src/server/db/queries/plans.ts", "src/server/db/schema/plans.ts"],
  ["src/pages/api/plans.ts", "src/server/plans/plans.ts"],
  ["scripts/seed/main.ts", "src/server/db/queries/plans.ts"],
  ["src/field/segment.test.ts", "src/server/env.ts"],
])("%s may import %s", (from, to) => {
  expect(between(from, to)).toEqual([]);
});

test.each([
  ["src/domain/plan.ts", "src/field/segment.ts"],
  ["src/field/segment.ts", "src/domain/plan.ts"],
  ["src/screening/screen.ts", "src/server/env.ts"],
  ["src/sheet/view.ts", "src/client/api.ts"],
  ["src/workers/node.ts", "src/server/env.ts"],
  ["src/client/api.ts", "src/workers/node.ts"],
  ["src/components/Desk.tsx", "src/server/desk/desk.ts"],
  ["src/layouts/Page.astro", "src/server/env.ts"],
  ["src/server/plans/plans.ts", "src/sheet/view.ts"],
  ["src/server/plans/plans.ts", "src/server/db/schema/plans.ts"],
  ["src/pages/desk.astro", "src/server/db/queries/desk.ts"],
  ["src/middleware.ts", "src/server/db/queries/sessions.ts"],
  ["scripts/seed/main.ts", "src/components/Desk.tsx"],
  ["src/server/env.ts", "src/server/env.test.ts"],
])("%s may not import %s", (from, to) => {
  const code = (path: string) =>
    from.endsWith(".astro") ? `---\nimport "${path}";\n---\n<p></p>` : `import "${path}";`;
  expect(between(from, to, code)).toEqual([expect.stringContaining(`${from}: imports ${to}, but `)]);
});

test.each([
  ["a type", (path: string) => `import type { X } from "${path}";`],
  ["an inline type", (path: string) => `let x: import("${path}").X;`],
  ["a dynamic import", (path: string) => `await import("${path}");`],
  ["an export of another's", (path: string) => `export const y = 1; export { x } from "${path}";`],
  ["generic JSX-less code before it", (path: string) => `const f = <T,>(t: T) => t; import "${path}";`],
])("%s counts as an import", (_what, line) => {
  expect(between("src/domain/plan.ts", "src/server/env.ts", line)).toHaveLength(1);
});

test("relative imports, workers' addresses and scripts of Astro components count too", () => {
  const server = { "src/server/env.ts": "" };
  expect(check({ ...server, "src/components/A.tsx": 'import "../server/env";' })).toHaveLength(1);
  const worker = 'new Worker(new URL("../server/env.ts", import.meta.url));';
  expect(check({ ...server, "src/workers/browser.ts": worker })).toHaveLength(1);
  const astro = '---\nconst a = 1;\n---\n<script>import "../server/env";</script>';
  expect(check({ ...server, "src/components/A.astro": astro })).toHaveLength(1);
});

test("nothing imports fakes or tests", () => {
  const files = { "fakes/s3/server.ts": "", "tests/support/people.ts": "" };
  expect(check({ ...files, "scripts/a.ts": 'import "../fakes/s3/server";' })).toHaveLength(1);
  expect(check({ ...files, "fakes/b.ts": 'import "../tests/support/people";' })).toHaveLength(1);
  expect(
    check({ ...files, "tests/c.ts": 'import "./support/people"; import "../fakes/s3/server";' }),
  ).toEqual([]);
});

test("SQL packages stay in server/db, and pure rooms have no Node.js", () => {
  expect(check({ "src/server/plans/plans.ts": 'import { eq } from "drizzle-orm";' })).toHaveLength(1);
  expect(check({ "src/server/db/queries/plans.ts": 'import { eq } from "drizzle-orm";' })).toEqual([]);
  expect(check({ "src/field/segment.ts": 'import fs from "node:fs";' })).toHaveLength(1);
  expect(check({ "src/screening/command.ts": 'import fs from "node:fs";' })).toEqual([]);
});

test("rings are found, type imports included, and shown", () => {
  expect(
    check({
      "src/domain/a.ts": 'import "./b";',
      "src/domain/b.ts": 'import type { C } from "./c";',
      "src/domain/c.ts": 'import "~/domain/a";',
      "src/domain/d.ts": 'import "./a";',
    }),
  ).toEqual([
    "src/domain/a.ts: imports itself in a ring: src/domain/a.ts → src/domain/b.ts → src/domain/c.ts → src/domain/a.ts",
  ]);
});

test("barrels are refused, an index that does something is not", () => {
  const plan = { "src/domain/plan.ts": "export const x = 1;" };
  expect(check({ ...plan, "src/domain/index.ts": 'export * from "./plan";' })).toHaveLength(1);
  expect(check({ ...plan, "src/domain/all.ts": 'export { x } from "./plan";' })).toHaveLength(1);
  expect(check({ "src/pages/api/sites/index.ts": "export const GET = () => new Response();" })).toEqual([]);
});

test("an import of nothing is a fault", () => {
  expect(check({ "src/domain/a.ts": 'import "./gone"; import "zod";' })).toEqual([
    "src/domain/a.ts: imports ./gone, which does not exist",
  ]);
});
