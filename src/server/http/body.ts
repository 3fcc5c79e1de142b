import { type Fault, Refusal } from "~/domain/errors";
import type { z } from "zod";

const megabyteBytes = 1_000_000;

/**
 * Reads a request's body up to `maxBytes`, refusing as soon as it is longer, whatever Content-Length says.
 * @throws Refusal request.too-large
 */
export async function readBody(request: Request, maxBytes: number): Promise<Uint8Array<ArrayBuffer>> {
  const tooLarge = () =>
    new Refusal(
      "request.too-large",
      `The request is larger than ${String(maxBytes / megabyteBytes)} MB. Send a smaller one.`,
      { detail: { maxBytes } },
    );
  if (Number(request.headers.get("content-length") ?? 0) > maxBytes) throw tooLarge();
  const chunks: Uint8Array[] = [];
  let sizeBytes = 0;
  if (request.body !== null) {
    for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
      sizeBytes += chunk.byteLength;
      if (sizeBytes > maxBytes) throw tooLarge();
      chunks.push(chunk);
    }
  }
  const body = new Uint8Array(sizeBytes);
  let offset = 0;
  for (const chunk of chunks) {
    body.set(chunk, offset);
    offset += chunk.byteLength;
  }
  return body;
}

const mediaTypeOf = (request: Request): string | undefined =>
  (request.headers.get("content-type") ?? "").split(";")[0]?.trim().toLowerCase();

const readText = async (request: Request, maxBytes: number): Promise<string> =>
  new TextDecoder().decode(await readBody(request, maxBytes));

/**
 * The text of a JSON body that somebody else will parse.
 * @throws Refusal request.wrong-type, request.too-large
 */
export async function readJsonText(request: Request, maxBytes: number): Promise<string> {
  if (mediaTypeOf(request) !== "application/json")
    throw new Refusal("request.wrong-type", "Send the body as application/json.");
  return readText(request, maxBytes);
}

/** A path such as `recipients[0].email`. */
function faultPath(path: readonly PropertyKey[]): string {
  return path.reduce<string>(
    (text, key) =>
      typeof key === "number"
        ? `${text}[${String(key)}]`
        : text === ""
          ? String(key)
          : `${text}.${String(key)}`,
    "",
  );
}

export const faultsOf = (error: z.ZodError): Fault[] =>
  error.issues.map((issue) => ({ path: faultPath(issue.path), message: issue.message }));

/**
 * Reads a JSON body, or a posted form where `form` says that a page posts here without a script.
 * @throws Refusal request.wrong-type, request.too-large, request.malformed, input.refused
 */
export async function parseBody<T extends z.ZodType>(
  request: Request,
  schema: T,
  options: { maxBytes: number; form: boolean },
): Promise<z.output<T>> {
  const isForm = options.form && mediaTypeOf(request) === "application/x-www-form-urlencoded";
  const text = isForm
    ? await readText(request, options.maxBytes)
    : await readJsonText(request, options.maxBytes);
  let value: unknown;
  try {
    value = isForm ? Object.fromEntries(new URLSearchParams(text)) : JSON.parse(text);
  } catch (cause) {
    throw new Refusal("request.malformed", "The body is not valid JSON. Check it and send it again.", {
      cause,
    });
  }
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new Refusal("input.refused", "Some of what was entered cannot be used; each place says why.", {
    faults: faultsOf(parsed.error),
  });
}
