import { posix } from "node:path";
import { findCycles } from "./cycles";
import { importsOf } from "./imports-of";
import { whyNot, whyNotPackage } from "./rooms";

const extensions = ["", ".ts", ".tsx", ".mts", ".d.ts", ".astro", "/index.ts", "/index.tsx"];

/**
 * The import rule over a set of files.
 * @param files text by path from the repository's root, "/" between folders
 * @param exists whether a path is a file at all, for imports of styles, data and the like
 * @returns a line for each fault: `path: what is wrong`
 */
export function checkImports(
  files: ReadonlyMap<string, string>,
  exists: (path: string) => boolean = (path) => files.has(path),
): string[] {
  const faults: string[] = [];
  const graph = new Map<string, string[]>();
  for (const [path, text] of files) {
    const { specifiers, isBarrel } = importsOf(path, text);
    const targets = new Set<string>();
    if (isBarrel) faults.push(`${path}: is a barrel; import from where things are`);
    for (const specifier of specifiers) {
      const target = resolve(path, specifier, exists);
      if (target === "package") {
        const reason = whyNotPackage(path, specifier);
        if (reason) faults.push(`${path}: imports ${specifier}, but ${reason}`);
      } else if (target === undefined) {
        faults.push(`${path}: imports ${specifier}, which does not exist`);
      } else {
        targets.add(target);
        const reason = whyNot(path, target);
        if (reason) faults.push(`${path}: imports ${target}, but ${reason}`);
      }
    }
    graph.set(path, [...targets]);
  }
  for (const ring of findCycles(graph)) {
    faults.push(`${ring[0]}: imports itself in a ring: ${[...ring, ring[0]].join(" → ")}`);
  }
  return faults;
}

function resolve(
  from: string,
  specifier: string,
  exists: (path: string) => boolean,
): string | "package" | undefined {
  const plain = specifier.split("?")[0] ?? specifier;
  let base: string;
  if (plain.startsWith("~/")) base = `src/${plain.slice(2)}`;
  else if (/^\.{1,2}(\/|$)/.test(plain)) base = posix.join(posix.dirname(from), plain);
  else return "package";
  return extensions.map((extension) => base + extension).find(exists);
}
