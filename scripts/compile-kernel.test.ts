import { readFile } from "node:fs/promises";
import { expect, test } from "vitest";
import { kernelModuleText, SEGMENT_WASM_MODULE } from "./compile-kernel";
import { inRepository } from "./services/repository";

test("the committed kernel is what its source compiles to", { timeout: 60_000 }, async () => {
  const committed = await readFile(inRepository(SEGMENT_WASM_MODULE), "utf8");
  expect(committed).toBe(await kernelModuleText());
});
