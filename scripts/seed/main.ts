import { Refusal } from "../../src/domain/errors";
import { closeDatabase, db } from "../../src/server/db/client";
import { findOrganisationBySlug } from "../../src/server/db/queries/organisations";
import { env } from "../../src/server/env";
import { slugOf } from "../../src/server/organisations/organisations";
import { closeScreeningPool } from "../../src/server/screenings/pool";
import { closeStorage } from "../../src/server/storage/client";
import { ensureBucket } from "../../src/server/storage/objects";
import { quillhaven } from "./demo-people";
import { seedOstwick } from "./ostwick";
import { seedQuillhaven } from "./quillhaven";

/** Fills an empty database and store with the demo. @throws Error where that must not be done */
async function seed(): Promise<void> {
  if (!env().localFakes)
    throw new Error(
      "The demo is made on the fakes of this machine only. Start the application with npm start, which makes it.",
    );
  if ((await findOrganisationBySlug(db(), slugOf(quillhaven))) !== undefined)
    throw new Error(
      `${quillhaven} is in the database already, so nothing was changed. Set DATA_DIR to a new folder for a fresh demo.`,
    );
  await ensureBucket();
  await seedQuillhaven();
  await seedOstwick();
}

try {
  await seed();
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  if (error instanceof Refusal)
    for (const { path, message } of error.faults) console.error(`  ${path}: ${message}`);
  process.exitCode = 1;
} finally {
  await closeScreeningPool();
  await closeDatabase();
  closeStorage();
}
