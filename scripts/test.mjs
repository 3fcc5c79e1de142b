import { prepare } from "./bootstrap/prepare.mjs";

await prepare();
await import("./test/main.ts");
