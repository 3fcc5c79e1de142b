/** Where a file stands in the house, by its path from the repository's root. */
export function roomOf(path: string): string {
  if (/\.test\.tsx?$/.test(path)) return "tests";
  const [first = "", second = "", ...deeper] = path.split("/");
  if (first !== "src") return deeper.length > 0 || second !== "" ? first : "configuration";
  return deeper.length > 0 ? second : second.replace(/\..*$/, "");
}

const startsWith =
  (...prefixes: string[]) =>
  (path: string): boolean =>
    prefixes.some((prefix) => path.startsWith(`src/${prefix}`));

const page = (path: string): boolean =>
  startsWith("server/", "layouts/", "components/", "domain/", "client/", "styles/")(path) &&
  !startsWith("server/db/queries/", "server/db/schema")(path);

const anywhere = (path: string): boolean => !/^(fakes|tests)\//.test(path);

/** Besides its own room: what each may import. A room that is not named may import nothing. */
const mayImport: Readonly<Record<string, (path: string) => boolean>> = {
  domain: () => false,
  field: startsWith("domain/units"),
  screening: startsWith("domain/", "field/"),
  sheet: startsWith("domain/"),
  workers: startsWith("screening/", "domain/"),
  client: startsWith("domain/", "workers/protocol", "workers/browser"),
  components: startsWith("domain/", "sheet/", "client/", "styles/"),
  layouts: startsWith("domain/", "sheet/", "client/", "components/", "styles/"),
  server: startsWith("domain/", "screening/", "workers/protocol", "workers/text-protocol", "workers/node"),
  pages: page,
  middleware: page,
  env: page,
  scripts: (path) => anywhere(path) && !startsWith("components/", "layouts/", "pages/")(path),
  fakes: () => false,
  tests: () => true,
  configuration: anywhere,
};

/** The file that makes `npm run screen` of the engine reads and writes files. */
const commandLine = "src/screening/command.ts";
const pureRooms = new Set(["domain", "field", "screening", "sheet"]);

/** Why `from` may not import the file `to`, or undefined when it may. */
export function whyNot(from: string, to: string): string | undefined {
  const room = roomOf(from);
  const target = roomOf(to);
  if (target === "tests" && room !== "tests") return "nothing imports tests";
  if (target === "fakes" && !["fakes", "tests"].includes(room)) return "nothing imports fakes";
  if (room === "server" && startsWith("server/db/schema")(to) && !startsWith("server/db/")(from)) {
    return "SQL stands in server/db/queries only";
  }
  if (room === target || mayImport[room]?.(to)) return undefined;
  return `${room} may not import ${to.startsWith("src/server/db/") ? "the database" : target}`;
}

/** Why `from` may not import the package or built-in module, or undefined when it may. */
export function whyNotPackage(from: string, specifier: string): string | undefined {
  const room = roomOf(from);
  if (/^(drizzle-orm|mysql2)(\/|$)/.test(specifier) && from.startsWith("src/") && room !== "tests") {
    return startsWith("server/db/")(from) ? undefined : "SQL stands in server/db only";
  }
  if (specifier.startsWith("node:") && pureRooms.has(room) && from !== commandLine) {
    return `${room} is pure: no Node.js, no input, no output`;
  }
  return undefined;
}
