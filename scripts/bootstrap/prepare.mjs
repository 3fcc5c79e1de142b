import { spawnSync } from "node:child_process";
import { readFileSync, statSync } from "node:fs";
import { fileURLToPath } from "node:url";

// Plain JavaScript with nothing but Node.js: it runs before the npm packages are there.
const inRepository = (path) => fileURLToPath(new URL(`../../${path}`, import.meta.url));

/** Ends with a message when Node.js is older than package.json wants it. */
function checkNodeVersion() {
  const { engines } = JSON.parse(readFileSync(inRepository("package.json"), "utf8"));
  const wanted = engines.node.replace(">=", "").split(".").map(Number);
  const present = process.versions.node.split(".").map(Number);
  const difference =
    wanted.map((part, index) => (present[index] ?? 0) - part).find((part) => part !== 0) ?? 0;
  if (difference >= 0) return;
  console.error(
    `Node.js ${engines.node.replace(">=", "")} or later is needed; this is ${process.versions.node}. Install it and try again.`,
  );
  process.exit(1);
}

function modifiedAtMs(path) {
  try {
    return statSync(inRepository(path)).mtimeMs;
  } catch {
    return undefined;
  }
}

/** npm writes both files in one go when it changes the lockfile, in either order. */
const sameMomentMs = 10_000;

function installPackages() {
  const installedAtMs = modifiedAtMs("node_modules/.package-lock.json");
  if (installedAtMs !== undefined && installedAtMs + sameMomentMs > modifiedAtMs("package-lock.json")) return;
  console.log("Installing npm packages …");
  // Development packages too, whatever NODE_ENV says: the build and the fakes are among them.
  const { status } = spawnSync("npm", ["ci", "--ignore-scripts", "--include=dev", "--no-progress"], {
    cwd: inRepository("."),
    stdio: ["ignore", "ignore", "inherit"],
  });
  if (status === 0) return;
  console.error("npm ci failed, see above. Check the network and the npm registry settings, and try again.");
  process.exit(1);
}

/** Makes this process able to go on in TypeScript. */
export async function prepare() {
  checkNodeVersion();
  installPackages();
  const { register } = await import("tsx/esm/api");
  register();
}
