import type { Member } from "../../src/domain/permissions";
import { db } from "../../src/server/db/client";
import type { SiteRow } from "../../src/server/db/queries/sites";
import { storeDrawing } from "../../src/server/drawings/drawings";
import { createOrganisation } from "../../src/server/organisations/organisations";
import { saveDocument, workingCopyOf } from "../../src/server/plans/plan-documents";
import { createPlan } from "../../src/server/plans/plans";
import { screenPlan } from "../../src/server/screenings/screen-plan";
import { addContact } from "../../src/server/sites/contacts";
import { siteInput } from "../../src/server/sites/site-input";
import { createSite } from "../../src/server/sites/sites";
import { quillhaven } from "./demo-people";
import { demoPlan, demoPlanName } from "./demo-plan/demo-plan";
import { floorImage } from "./demo-plan/floor-image";
import { findPlanOf, findSiteOf } from "./find";
import { addPerson } from "./members";

const contacts = [
  {
    name: "Ilka Brandvold",
    email: "ilka.brandvold@quillhaven.example",
    duty: "Mounts and cables the sensors",
  },
  { name: "Anselm Korb", email: "anselm.korb@quillhaven.example", duty: "Runs the navigation test bay" },
  { name: "Site office", email: "site.office@quillhaven.example", duty: "Electrical works, north range" },
];

/** The demo's organisation with its people, its site and a plan that has been screened. */
export async function seedQuillhaven(): Promise<void> {
  const organisationId = await db().transaction((tx) => createOrganisation(tx, quillhaven));
  const planner = await addPerson(organisationId, "maren.oakshott");
  for (const subject of ["tobias.fennimore", "henrik.sallow", "ruta.vellamo"])
    await addPerson(organisationId, subject);
  const site = await seedSite(planner);
  await addPerson(organisationId, "ilka.brandvold", [site.id]);
  await seedPlan(planner, site);
}

async function seedSite(planner: Member): Promise<SiteRow> {
  const { id } = await createSite(
    planner,
    siteInput.parse({
      name: "Quillhaven works, north range",
      place: "Harbour Road 4, Quillhaven",
      timeZone: "Europe/Berlin",
      latitudeDeg: 54.2,
      longitudeDeg: 7.9,
      altitudeM: 10,
      phaseLabels: "L1/L2/L3",
    }),
  );
  const site = await findSiteOf(planner, id);
  for (const contact of contacts) await addContact(planner, site, contact);
  return site;
}

/** Every step as a planner would take it: begin the plan, upload its drawing, save the document, screen it. */
async function seedPlan(planner: Member, site: SiteRow): Promise<void> {
  const { id } = await createPlan(planner, site, demoPlanName);
  const plan = await findPlanOf(planner, id);
  const drawing = await storeDrawing(planner, plan, {
    bytes: await floorImage(),
    fileName: "quillhaven-level-1.png",
  });
  const { version: baseVersion, document: empty } = await workingCopyOf(plan);
  const document = demoPlan(drawing, empty.earthField);
  const { version } = await saveDocument(planner, plan, { baseVersion, document });
  await screenPlan(planner, plan, version);
}
