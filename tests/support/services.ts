import { inject } from "vitest";
import type { TestServices } from "./test-services";

/** What the global set-up of the project gave to its workers. */
export const services = (): TestServices => inject("services");
