import { z } from "zod";

const loopbackHosts = new Set(["127.0.0.1", "localhost", "[::1]"]);
const isLoopback = (url: string): boolean => loopbackHosts.has(new URL(url).hostname);

const environmentSchema = z
  .object({
    APP_ORIGIN: z.url({ protocol: /^https?$/ }).refine((url) => new URL(url).origin === url, {
      message: "give the scheme, host and port only, such as https://plans.example",
    }),
    HOST: z.string().default("127.0.0.1"),
    PORT: z.coerce.number().int().min(0).max(65_535).default(4810),
    DATABASE_URL: z.url({ protocol: /^(mysql|mariadb)$/ }),
    MIGRATION_DATABASE_URL: z.url({ protocol: /^(mysql|mariadb)$/ }).optional(),
    S3_ENDPOINT: z.url({ protocol: /^https?$/ }),
    S3_REGION: z.string().min(1).default("local"),
    S3_BUCKET: z.string().min(3),
    S3_ACCESS_KEY_ID: z.string().min(1),
    S3_SECRET_ACCESS_KEY: z.string().min(1),
    SMTP_URL: z.url({ protocol: /^smtps?$/ }),
    MAIL_FROM: z.string().min(3),
    OIDC_ISSUER: z.url({ protocol: /^https?$/ }),
    OIDC_CLIENT_ID: z.string().min(1),
    OIDC_CLIENT_SECRET: z.string().min(1),
    LOG_LEVEL: z.enum(["trace", "debug", "info", "warn", "error", "silent"]).default("info"),
    LOCAL_FAKES: z.stringbool().default(false),
    TRUST_PROXY: z.stringbool().default(false),
  })
  .superRefine((value, context) => {
    if (!value.LOCAL_FAKES) return;
    for (const key of ["APP_ORIGIN", "DATABASE_URL", "S3_ENDPOINT", "SMTP_URL", "OIDC_ISSUER"] as const)
      if (!isLoopback(value[key]))
        context.addIssue({
          code: "custom",
          path: [key],
          message:
            "with LOCAL_FAKES every address must be a loopback address; real services and fakes do not mix",
        });
  })
  .transform((value) => ({
    appOrigin: value.APP_ORIGIN,
    host: value.HOST,
    port: value.PORT,
    databaseUrl: value.DATABASE_URL,
    migrationDatabaseUrl: value.MIGRATION_DATABASE_URL,
    s3: {
      endpoint: value.S3_ENDPOINT,
      region: value.S3_REGION,
      bucket: value.S3_BUCKET,
      accessKeyId: value.S3_ACCESS_KEY_ID,
      secretAccessKey: value.S3_SECRET_ACCESS_KEY,
    },
    smtpUrl: value.SMTP_URL,
    mailFrom: value.MAIL_FROM,
    oidc: {
      issuer: value.OIDC_ISSUER,
      clientId: value.OIDC_CLIENT_ID,
      clientSecret: value.OIDC_CLIENT_SECRET,
    },
    logLevel: value.LOG_LEVEL,
    localFakes: value.LOCAL_FAKES,
    trustProxy: value.TRUST_PROXY,
  }));

export type Environment = z.output<typeof environmentSchema>;

/**
 * Parses an environment.
 * @throws Error that lists each variable at fault and what it must be, never a value.
 */
export function parseEnvironment(variables: Record<string, string | undefined>): Environment {
  const parsed = environmentSchema.safeParse(variables);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  ${issue.path.join(".")}: ${issue.message}`);
  throw new Error(
    `The environment is not complete:\n${lines.join("\n")}\nREADME.md, "Configuration", lists every variable.`,
  );
}

let parsedOnce: Environment | undefined;

/** The process's environment, parsed on first use. */
export function env(): Environment {
  parsedOnce ??= parseEnvironment(process.env);
  return parsedOnce;
}
