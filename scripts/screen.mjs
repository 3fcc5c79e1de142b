import { spawnSync } from "node:child_process";
import { existsSync, readdirSync, statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

// Runs the built command where it is newer than every source it is built from, the TypeScript through tsx otherwise.
const root = dirname(dirname(fileURLToPath(import.meta.url)));
const built = join(root, "dist/node/screen.mjs");
const SOURCES = ["src/domain", "src/field", "src/screening"];

function newestMs(folder) {
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && !entry.name.endsWith(".test.ts"))
    .reduce(
      (newest, entry) => Math.max(newest, statSync(join(entry.parentPath ?? entry.path, entry.name)).mtimeMs),
      0,
    );
}

function isFresh() {
  if (!existsSync(built)) return false;
  const builtMs = statSync(built).mtimeMs;
  return SOURCES.every((folder) => newestMs(join(root, folder)) <= builtMs);
}

const command = isFresh()
  ? [built]
  : ["--import", import.meta.resolve("tsx"), join(root, "src/screening/command.ts")];
const { status, error } = spawnSync(process.execPath, [...command, ...process.argv.slice(2)], {
  stdio: "inherit",
  env: { ...process.env, TSX_TSCONFIG_PATH: join(root, "tsconfig.json") },
});
if (error) console.error(error.message);
process.exitCode = status ?? 1;
