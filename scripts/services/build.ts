import { createHash } from "node:crypto";
import { existsSync, readFileSync, readdirSync, writeFileSync } from "node:fs";
import { join, relative } from "node:path";
import { isBuilt } from "./app";
import { baseEnvironment } from "./local-environment";
import { inRepository, repositoryFolder } from "./repository";
import { runCommand, type CommandResult } from "./run-command";

const sources = [
  "src",
  "public",
  "astro.config.mjs",
  "package.json",
  "package-lock.json",
  "tsconfig.json",
  "vite.node.config.ts",
];
const hashFile = inRepository("dist/sources.sha256");
const isTest = /\.test\.tsx?$/;

function filesUnder(path: string): string[] {
  if (!existsSync(path)) return [];
  return readdirSync(path, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && !isTest.test(entry.name))
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
}

/** One hash of the names and contents of everything that the build reads. */
export function hashOfSources(): string {
  const hash = createHash("sha256");
  for (const source of sources) {
    const path = inRepository(source);
    const files = /\.\w+$/.test(source) ? [path] : filesUnder(path);
    for (const file of files) {
      hash
        .update(`${relative(repositoryFolder, file)}\0`)
        .update(readFileSync(file))
        .update("\0");
    }
  }
  return hash.digest("hex");
}

export const isBuildCurrent = (): boolean =>
  isBuilt() && existsSync(hashFile) && readFileSync(hashFile, "utf8") === hashOfSources();

/** As for production, whatever NODE_ENV is here: a test's would ship React's development build. */
export async function build(options: { echo?: boolean } = {}): Promise<CommandResult> {
  const hash = hashOfSources();
  const result = await runCommand("npm", ["run", "build"], {
    cwd: repositoryFolder,
    env: { ...process.env, ...baseEnvironment(), ASTRO_TELEMETRY_DISABLED: "1" },
    ...options,
  });
  if (result.status === 0) writeFileSync(hashFile, hash);
  return result;
}
