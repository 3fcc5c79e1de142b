import type { Role } from "../../src/domain/roles";

export interface DemoPerson {
  subject: string;
  name: string;
  email: string;
  /** What the list of people who can sign in says of them. */
  remark: string;
  organisation: string;
  roles: readonly Role[];
}

export const quillhaven = "Quillhaven Instruments";
export const ostwick = "Ostwick Survey";

/** The demo's people, as its sign-in service knows them. They and their organisations are invented. */
export const demoPeople: readonly DemoPerson[] = [
  {
    subject: "maren.oakshott",
    name: "Maren Oakshott",
    email: "maren.oakshott@quillhaven.example",
    remark: "Planner",
    organisation: quillhaven,
    roles: ["planner"],
  },
  {
    subject: "tobias.fennimore",
    name: "Tobias Fennimore",
    email: "tobias.fennimore@quillhaven.example",
    remark: "Auditor",
    organisation: quillhaven,
    roles: ["auditor"],
  },
  {
    subject: "ilka.brandvold",
    name: "Ilka Brandvold",
    email: "ilka.brandvold@quillhaven.example",
    remark: "Installer",
    organisation: quillhaven,
    roles: ["installer"],
  },
  {
    subject: "henrik.sallow",
    name: "Henrik Sallow",
    email: "henrik.sallow@quillhaven.example",
    remark: "Admin",
    organisation: quillhaven,
    roles: ["admin"],
  },
  {
    subject: "ruta.vellamo",
    name: "Ruta Vellamo",
    email: "ruta.vellamo@quillhaven.example",
    remark: "Planner and auditor",
    organisation: quillhaven,
    roles: ["planner", "auditor"],
  },
  {
    subject: "dagny.ravnkilde",
    name: "Dagny Ravnkilde",
    email: "dagny.ravnkilde@ostwick.example",
    remark: "Planner of another organisation",
    organisation: ostwick,
    roles: ["planner"],
  },
];
