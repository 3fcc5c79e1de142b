import * as z from "zod";
import { oneLine } from "./one-line";

/** What a notice tells; clearance and withdrawal join when revisions are released. */
export const noticeKinds = ["screening"] as const;
export type NoticeKind = (typeof noticeKinds)[number];

/** A draft may still be edited and previewed; an issued notice stands as it was sent. */
export const noticeStates = ["draft", "issued"] as const;
export type NoticeState = (typeof noticeStates)[number];

/** Stands on every notice as long as no revision is released from its plan. */
export const preliminaryMark = "PRELIMINARY, NOT FOR MOUNTING";

export const coveringTextMaxLength = 4000;
export const maxRecipients = 100;

const controlsButLineEndAndTab = /[^\P{Cc}\n\t]/gu;

/** Plain text; line ends are made uniform so that preview, mail and database agree. */
export const coveringTextSchema = z
  .string()
  .max(coveringTextMaxLength, `The covering text has at most ${coveringTextMaxLength} characters.`)
  .transform((text) => text.replace(/\r\n?/g, "\n").replace(controlsButLineEndAndTab, "").trim());

export const recipientSchema = z.strictObject({
  name: z
    .string()
    .trim()
    .min(1, "Give the person's name.")
    .max(200, "A name has at most 200 characters.")
    .refine((name) => oneLine(name) === name, "A name is one line without control characters."),
  email: z
    .string()
    .trim()
    .toLowerCase()
    .max(254, "An address has at most 254 characters.")
    .pipe(z.email("Write an e-mail address such as name@company.example.")),
});

export type Recipient = z.output<typeof recipientSchema>;

/** Each address once, under the name that came first. */
export const recipientsSchema = z
  .array(recipientSchema)
  .max(maxRecipients, `A notice goes to at most ${maxRecipients} people.`)
  .transform((recipients) =>
    recipients.filter(({ email }, index) => recipients.findIndex((other) => other.email === email) === index),
  );
