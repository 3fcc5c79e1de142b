import { readFileSync } from "node:fs";
import { z } from "zod";

const peopleSchema = z
  .array(
    z.object({
      subject: z.string().min(1),
      name: z.string().min(1),
      email: z.email(),
      remark: z.string(),
    }),
  )
  .min(1);

export type Person = z.output<typeof peopleSchema>[number];

/** @throws when the file is no list of people, with what is wrong and where */
export function readPeople(file: string): Person[] {
  const parsed = peopleSchema.safeParse(JSON.parse(readFileSync(file, "utf8")));
  if (parsed.success) return parsed.data;
  throw new Error(`${file} is no list of people: ${z.prettifyError(parsed.error)}`);
}
