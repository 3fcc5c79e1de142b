import { writeFile } from "node:fs/promises";
import { kernelModuleText, SEGMENT_WASM_MODULE } from "./compile-kernel";
import { inRepository } from "./services/repository";

await writeFile(inRepository(SEGMENT_WASM_MODULE), await kernelModuleText());
console.log(`${SEGMENT_WASM_MODULE} written.`);
