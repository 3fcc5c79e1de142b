import {
  double,
  foreignKey,
  index,
  int,
  mysqlTable,
  primaryKey,
  unique,
  varchar,
} from "drizzle-orm/mysql-core";
import type { Verdict } from "~/domain/screening-result";
import { code, documentKey, exactText, id, instant, label, sha256Hex } from "../columns";
import { organisations, users } from "./people";

export const sites = mysqlTable(
  "sites",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id")
      .notNull()
      .references(() => organisations.id),
    name: label("name").notNull(),
    place: label("place").notNull(),
    /** IANA name, such as Europe/Berlin. */
    timeZone: code("time_zone", { length: 64 }).notNull(),
    /** Null until somebody states where on earth the site is. */
    latitudeDeg: double("latitude_deg"),
    longitudeDeg: double("longitude_deg"),
    /** Above the ellipsoid. */
    altitudeM: double("altitude_m"),
    /** The site's own names of its phases, in the order a, b, c. */
    phaseLabels: varchar("phase_labels", { length: 32 }).notNull(),
    createdAt: instant("created_at").notNull(),
    archivedAt: instant("archived_at"),
  },
  (t) => [
    unique("sites_in_organisation").on(t.organisationId, t.id),
    unique("sites_name").on(t.organisationId, t.name),
  ],
);

/** Sites that a member who holds no office role may see. */
export const siteAssignments = mysqlTable(
  "site_assignments",
  {
    organisationId: id("organisation_id").notNull(),
    siteId: id("site_id").notNull(),
    userId: id("user_id").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.userId] }),
    foreignKey({
      name: "site_assignments_site",
      columns: [t.organisationId, t.siteId],
      foreignColumns: [sites.organisationId, sites.id],
    }).onDelete("cascade"),
    foreignKey({
      name: "site_assignments_user",
      columns: [t.organisationId, t.userId],
      foreignColumns: [users.organisationId, users.id],
    }).onDelete("cascade"),
  ],
);

/** People to notify of a site's screenings; they need no account. */
export const siteContacts = mysqlTable(
  "site_contacts",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    siteId: id("site_id").notNull(),
    name: label("name").notNull(),
    email: varchar("email", { length: 254 }).notNull(),
    /** What they do on site, in the site's own words. */
    duty: label("duty").notNull(),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [
    unique("site_contacts_email").on(t.siteId, t.email),
    foreignKey({
      name: "site_contacts_site",
      columns: [t.organisationId, t.siteId],
      foreignColumns: [sites.organisationId, sites.id],
    }).onDelete("cascade"),
  ],
);

/** One floor sheet of a site. */
export const plans = mysqlTable(
  "plans",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    siteId: id("site_id").notNull(),
    name: label("name").notNull(),
    createdBy: id("created_by").references(() => users.id),
    createdAt: instant("created_at").notNull(),
    archivedAt: instant("archived_at"),
  },
  (t) => [
    unique("plans_name").on(t.siteId, t.name),
    unique("plans_in_organisation").on(t.organisationId, t.id),
    foreignKey({
      name: "plans_site",
      columns: [t.organisationId, t.siteId],
      foreignColumns: [sites.organisationId, sites.id],
    }),
  ],
);

/** The working copy of a plan. Each save makes the next version out of the one that the editor had opened. */
export const planDocuments = mysqlTable("plan_documents", {
  planId: id("plan_id")
    .primaryKey()
    .references(() => plans.id, { onDelete: "cascade" }),
  version: int("version").notNull(),
  document: exactText("document").notNull(),
  savedBy: id("saved_by").references(() => users.id),
  savedAt: instant("saved_at").notNull(),
});

/** An uploaded floor plan, re-encoded; the original is not kept. */
export const drawings = mysqlTable(
  "drawings",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    planId: id("plan_id").notNull(),
    storageKey: code("storage_key", { length: 128 }).notNull().unique(),
    thumbnailKey: code("thumbnail_key", { length: 128 }).notNull().unique(),
    mediaType: code("media_type", { length: 32 }).notNull(),
    widthPx: int("width_px").notNull(),
    heightPx: int("height_px").notNull(),
    sizeBytes: int("size_bytes").notNull(),
    sha256: sha256Hex("sha256").notNull(),
    /** The name of the file as the person had it. */
    fileName: varchar("file_name", { length: 255 }).notNull(),
    uploadedBy: id("uploaded_by").references(() => users.id),
    uploadedAt: instant("uploaded_at").notNull(),
  },
  (t) => [
    index("drawings_plan").on(t.planId, t.uploadedAt),
    foreignKey({
      name: "drawings_plan_fk",
      columns: [t.organisationId, t.planId],
      foreignColumns: [plans.organisationId, plans.id],
    }),
  ],
);

/** A plan document with what the engine said of it. Never changed. */
export const screenings = mysqlTable(
  "screenings",
  {
    id: id("id").primaryKey(),
    organisationId: id("organisation_id").notNull(),
    planId: id("plan_id").notNull(),
    documentVersion: int("document_version").notNull(),
    inputHash: code("input_hash", { length: 80 }).notNull(),
    engineVersion: code("engine_version", { length: 32 }).notNull(),
    verdict: code("verdict", { length: 16 }).$type<Verdict>().notNull(),
    document: exactText("document").notNull(),
    result: exactText("result").notNull(),
    screenedBy: id("screened_by").references(() => users.id),
    screenedAt: instant("screened_at").notNull(),
  },
  (t) => [
    unique("screenings_in_organisation").on(t.organisationId, t.id),
    index("screenings_plan").on(t.planId, t.screenedAt),
    foreignKey({
      name: "screenings_plan_fk",
      columns: [t.organisationId, t.planId],
      foreignColumns: [plans.organisationId, plans.id],
    }),
  ],
);

/** One row for each limit of each sensor of a screening, so that lists need not open results. */
export const findings = mysqlTable(
  "findings",
  {
    screeningId: id("screening_id")
      .notNull()
      .references(() => screenings.id, { onDelete: "cascade" }),
    sensorId: documentKey("sensor_id").notNull(),
    limitId: documentKey("limit_id").notNull(),
    sensorName: label("sensor_name", 300).notNull(),
    kind: code("kind", { length: 16 }).notNull(),
    limitValue: double("limit_value").notNull(),
    value: double("value").notNull(),
    expandedUncertainty: double("expanded_uncertainty").notNull(),
    unit: code("unit", { length: 8 }).notNull(),
    budgetUsed: double("budget_used").notNull(),
    verdict: code("verdict", { length: 16 }).$type<Verdict>().notNull(),
    loadCaseId: documentKey("load_case_id"),
  },
  (t) => [primaryKey({ columns: [t.screeningId, t.sensorId, t.limitId] })],
);

/** Who is having a document screened without keeping it: one at a time each, over all processes. */
export const statelessScreenings = mysqlTable("stateless_screenings", {
  userId: id("user_id")
    .primaryKey()
    .references(() => users.id, { onDelete: "cascade" }),
  /** Names the run that holds the place. */
  runId: id("run_id").notNull(),
  /** When the place is free again even if nobody gave it back, because the process ended. */
  expiresAt: instant("expires_at").notNull(),
});
