import { Refusal } from "~/domain/errors";
import { db } from "../db/client";
import { ping } from "../db/queries/health";

/** @throws Refusal service.unavailable when the database does not answer */
export async function checkHealth(): Promise<void> {
  try {
    await ping(db());
  } catch (cause) {
    throw new Refusal(
      "service.unavailable",
      "The database does not answer. Look at the service's log and at the database.",
      { cause },
    );
  }
}
