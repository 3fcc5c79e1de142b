import * as z from "zod";
import { roles } from "../roles";

export const rolesAnswer = z.object({ roles: z.array(z.enum(roles)) });

export const mailAcceptedAnswer = z.object({ accepted: z.literal(true) });

export const healthAnswer = z.object({ status: z.literal("ok") });

export const invitedAnswer = z.object({ id: z.uuid() });

export const sitesAnswer = z.object({ siteIds: z.array(z.uuid()) });

export const installersAnswer = z.object({ userIds: z.array(z.uuid()) });
