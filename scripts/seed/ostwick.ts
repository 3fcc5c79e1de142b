import { db } from "../../src/server/db/client";
import { createOrganisation } from "../../src/server/organisations/organisations";
import { createPlan } from "../../src/server/plans/plans";
import { siteInput } from "../../src/server/sites/site-input";
import { createSite } from "../../src/server/sites/sites";
import { ostwick } from "./demo-people";
import { findSiteOf } from "./find";
import { addPerson } from "./members";

/** A second organisation, so that one can see that neither sees the other. */
export async function seedOstwick(): Promise<void> {
  const organisationId = await db().transaction((tx) => createOrganisation(tx, ostwick));
  const planner = await addPerson(organisationId, "dagny.ravnkilde");
  const { id } = await createSite(
    planner,
    siteInput.parse({
      name: "Ostwick observatory hut",
      place: "Moor Lane, Ostwick",
      timeZone: "Europe/London",
      latitudeDeg: 55.31,
      longitudeDeg: -3.2,
      altitudeM: 240,
      phaseLabels: "L1/L2/L3",
    }),
  );
  await createPlan(planner, await findSiteOf(planner, id), "Variometer hut");
}
