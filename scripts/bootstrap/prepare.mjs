import { spawnSync } from "node:child_process";
import { lstatSync, readFileSync } from "node:fs";
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

function packagesIn(lockfile) {
  try {
    return JSON.parse(readFileSync(inRepository(lockfile), "utf8")).packages;
  } catch {
    return undefined;
  }
}

/** Whether what npm says it installed last is what the lockfile wants; optional ones depend on the machine. */
function isInstalled() {
  const wanted = Object.entries(packagesIn("package-lock.json")).filter(([path]) => path !== "");
  const present = packagesIn("node_modules/.package-lock.json");
  if (present === undefined) return false;
  return wanted.every(([path, { version, optional }]) =>
    present[path] === undefined ? optional === true : present[path].version === version,
  );
}

function installPackages() {
  if (isInstalled()) return;
  if (lstatSync(inRepository("node_modules"), { throwIfNoEntry: false })?.isSymbolicLink()) {
    console.error(
      "node_modules is a link to another folder, where these packages are not all installed. Remove the link and try again.",
    );
    process.exit(1);
  }
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
