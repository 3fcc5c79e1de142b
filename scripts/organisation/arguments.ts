import { parseArgs } from "node:util";
import { z } from "zod";

export const usage = `npm run organisation -- create --name NAME --admin-name NAME --admin-email ADDRESS [--issuer URL] [--subject SUBJECT]

Creates an organisation and its first admin. With --subject the admin signs in through the sign-in provider
(--issuer, by default OIDC_ISSUER); without it by links sent to the address.`;

const given = (option: string) =>
  z
    .string({ error: `--${option} is missing.` })
    .trim()
    .min(1, `--${option} is empty.`);

const argumentsSchema = z.object({
  name: given("name").max(200, "--name is longer than 200 characters."),
  "admin-name": given("admin-name").max(200, "--admin-name is longer than 200 characters."),
  "admin-email": given("admin-email").pipe(z.email("--admin-email is not an e-mail address.").max(254)),
  issuer: z.url("--issuer is not an address.").optional(),
  subject: given("subject").max(255).optional(),
});

export interface Wish {
  name: string;
  admin: { name: string; email: string; identity?: { issuer: string; subject: string } };
}

/**
 * Reads the command's arguments.
 * @throws Error with each fault on a line of its own, and the usage
 */
export function readArguments(words: readonly string[], defaultIssuer: string): Wish {
  const refuse = (faults: string): never => {
    throw new Error(`${faults}\n\n${usage}`);
  };
  const [command, ...rest] = words;
  if (command !== "create") return refuse(`"${command ?? ""}" is no command.`);
  const option = { type: "string" } as const;
  let values: Record<string, string | undefined>;
  try {
    ({ values } = parseArgs({
      args: rest,
      options: { name: option, "admin-name": option, "admin-email": option, issuer: option, subject: option },
    }));
  } catch (error) {
    return refuse(error instanceof Error ? error.message : String(error));
  }
  const parsed = argumentsSchema.safeParse(values);
  if (!parsed.success) return refuse(parsed.error.issues.map((issue) => issue.message).join("\n"));
  const { name, issuer = defaultIssuer, subject } = parsed.data;
  if (subject === undefined && values["issuer"] !== undefined) return refuse("--issuer needs --subject.");
  return {
    name,
    admin: {
      name: parsed.data["admin-name"],
      email: parsed.data["admin-email"],
      ...(subject !== undefined && { identity: { issuer, subject } }),
    },
  };
}
