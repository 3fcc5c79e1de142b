import { readFile } from "node:fs/promises";
import asc from "assemblyscript/asc";
import { inRepository } from "./services/repository";

const SOURCE = "src/field/kernel/segment.as";
export const SEGMENT_WASM_MODULE = "src/field/kernel/segment-wasm.ts";

// asc takes only .ts files, which the rest of the tools would read as TypeScript.
const ENTRY = "segment.ts";
const FLAGS = ["--enable", "simd", "--runtime", "stub", "-O3", "--noAssert", "--noColors"];

/** Compiles the segment kernel; throws with the compiler's words when it refuses. */
async function compileKernel(): Promise<Uint8Array> {
  const source = await readFile(inRepository(SOURCE), "utf8");
  let wasm: Uint8Array | undefined;
  const { error, stderr } = await asc.main([ENTRY, ...FLAGS, "--outFile", "segment.wasm"], {
    readFile: (name) => (name === ENTRY ? source : null),
    writeFile: (_name, contents) => {
      if (typeof contents !== "string") wasm = contents;
    },
    listFiles: () => [],
  });
  if (error || !wasm) throw new Error(`${SOURCE} does not compile: ${stderr.toString() || String(error)}`);
  return wasm;
}

/** The text of the committed module that holds the compiled kernel. */
export async function kernelModuleText(): Promise<string> {
  const base64 = Buffer.from(await compileKernel()).toString("base64");
  return `/** The compiled segment.as, base64. Made by \`npx tsx scripts/build-kernel.ts\`; never edited. */
export const SEGMENT_WASM_BASE64 =
  "${base64}";
`;
}
