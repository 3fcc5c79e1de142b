import { existsSync, readFileSync, readdirSync, statSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { checkImports } from "./imports/check";
import { inRepository, repositoryFolder } from "./services/repository";

const isSource = /\.(ts|tsx|mts|astro)$/;
const folders = ["src", "scripts", "fakes", "tests"];

const paths = folders
  .map(inRepository)
  .filter((folder) => existsSync(folder))
  .flatMap((folder) => readdirSync(folder, { withFileTypes: true, recursive: true }))
  .filter((entry) => entry.isFile() && isSource.test(entry.name))
  .map((entry) => join(entry.parentPath, entry.name));

const files = new Map(
  paths.map((path) => [relative(repositoryFolder, path).split(sep).join("/"), readFileSync(path, "utf8")]),
);
const isFile = (path: string): boolean =>
  statSync(inRepository(path), { throwIfNoEntry: false })?.isFile() ?? false;

const faults = checkImports(files, isFile);
for (const fault of faults) console.error(fault);
console.log(
  faults.length === 0
    ? `The imports of ${files.size} files keep the rule.`
    : `${faults.length} import(s) break the rule.`,
);
process.exitCode = faults.length === 0 ? 0 : 1;
