import { prepare } from "./bootstrap/prepare.mjs";

await prepare();
await import("./start/main.ts");
