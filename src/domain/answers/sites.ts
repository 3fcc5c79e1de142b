import * as z from "zod";
import { instant } from "./common";

export const siteAnswer = z.object({
  id: z.uuid(),
  organisationId: z.uuid(),
  name: z.string(),
  place: z.string(),
  timeZone: z.string(),
  latitudeDeg: z.number().nullable(),
  longitudeDeg: z.number().nullable(),
  altitudeM: z.number().nullable(),
  phaseLabels: z.string(),
  createdAt: instant,
  archivedAt: instant.nullable(),
});

export const contactAddedAnswer = z.object({ id: z.uuid() });
