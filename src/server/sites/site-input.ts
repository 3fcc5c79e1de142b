import { z } from "zod";

const named = (what: string) =>
  z
    .string()
    .trim()
    .min(1, `Give ${what}.`)
    .max(200, `Keep ${what} to 200 characters.`)
    .regex(/^[^\p{Cc}]*$/u, `Take line breaks and control characters out of ${what}.`);

/** Whether the runtime's own time zone data knows the IANA name. */
function isTimeZone(name: string): boolean {
  if (name !== "UTC" && !name.includes("/")) return false;
  try {
    new Intl.DateTimeFormat("en-GB", { timeZone: name });
    return true;
  } catch {
    return false;
  }
}

const timeZone = z
  .string()
  .trim()
  .max(64)
  .refine(isTimeZone, "Choose a time zone by its IANA name, such as Europe/Berlin.");

/** Three different labels, in the order a, b, c, written as on site: "L1/L2/L3". */
const phaseLabels = z
  .string()
  .transform((text) => text.split("/").map((part) => part.trim()))
  .refine(
    (parts) =>
      parts.length === 3 &&
      new Set(parts).size === 3 &&
      parts.every((part) => /^[^\p{Cc}]{1,8}$/u.test(part)),
    "Give three different phase labels of at most 8 characters with strokes between them, such as L1/L2/L3.",
  )
  .transform((parts) => parts.join("/"));

const latitudeDeg = z
  .number()
  .min(-90, "A latitude lies between −90° and 90°.")
  .max(90, "A latitude lies between −90° and 90°.")
  .nullable();
const longitudeDeg = z
  .number()
  .min(-180, "A longitude lies between −180° and 180°.")
  .max(180, "A longitude lies between −180° and 180°.")
  .nullable();
const altitudeM = z
  .number()
  .min(-500, "An altitude lies between −500 m and 9000 m.")
  .max(9000, "An altitude lies between −500 m and 9000 m.")
  .nullable();

const fields = z.strictObject({
  name: named("the site's name"),
  place: named("the place"),
  timeZone,
  latitudeDeg,
  longitudeDeg,
  altitudeM,
  phaseLabels,
});

export const siteInput = fields
  .extend({
    latitudeDeg: latitudeDeg.default(null),
    longitudeDeg: longitudeDeg.default(null),
    altitudeM: altitudeM.default(null),
  })
  .superRefine((site, context) => {
    if ((site.latitudeDeg === null) === (site.longitudeDeg === null)) return;
    context.addIssue({
      code: "custom",
      path: [site.latitudeDeg === null ? "latitudeDeg" : "longitudeDeg"],
      message: "Give both latitude and longitude, or neither.",
    });
  });

/** Any of the fields; what is left out stays. Whether latitude and longitude fit is judged on the whole site. */
export const siteChangeInput = fields.partial();

export const contactInput = z.strictObject({
  name: named("the person's name"),
  email: z.email("Give an e-mail address, such as site.office@works.example.").max(254).toLowerCase(),
  duty: named("what the person does on site"),
});

export type SiteInput = z.output<typeof siteInput>;
export type SiteChangeInput = z.output<typeof siteChangeInput>;
export type ContactInput = z.output<typeof contactInput>;
