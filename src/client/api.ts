import type { z } from "zod";
import { errorAnswer } from "~/domain/answers/common";
import type { ErrorCode, Fault } from "~/domain/errors";

/** The server said no; `message` is meant for the person. */
export class ApiRefusal extends Error {
  readonly code: ErrorCode;
  readonly status: number;
  readonly faults: readonly Fault[];
  readonly detail: Readonly<Record<string, unknown>>;

  constructor(
    code: ErrorCode,
    status: number,
    message: string,
    more: { faults?: readonly Fault[]; detail?: Readonly<Record<string, unknown>> } = {},
  ) {
    super(message);
    this.name = "ApiRefusal";
    this.code = code;
    this.status = status;
    this.faults = more.faults ?? [];
    this.detail = more.detail ?? {};
  }
}

/** No answer that makes sense came back: no network, a dead server, a proxy's own page. */
export class NoConnection extends Error {
  constructor(cause?: unknown) {
    super("No connection to the server. Check the network; the sheet tries again by itself.", { cause });
    this.name = "NoConnection";
  }
}

/** Turns the body of a refused call into what is thrown for it. */
export function refusalOf(status: number, body: string): ApiRefusal | NoConnection {
  let json: unknown;
  try {
    json = JSON.parse(body);
  } catch (malformed) {
    return new NoConnection(malformed);
  }
  const parsed = errorAnswer.safeParse(json);
  if (!parsed.success) return new NoConnection(parsed.error);
  const { code, message, faults, detail } = parsed.data.error;
  return new ApiRefusal(code, status, message, {
    ...(faults !== undefined && { faults }),
    ...(detail !== undefined && { detail }),
  });
}

export interface CallOptions {
  method?: "GET" | "POST" | "PUT" | "PATCH" | "DELETE";
  body?: unknown;
  signal?: AbortSignal;
}

/**
 * Calls an endpoint and checks its answer against `schema`.
 * @throws ApiRefusal, NoConnection, or the signal's AbortError
 */
export async function callApi<T>(path: string, schema: z.ZodType<T>, options: CallOptions = {}): Promise<T> {
  let status: number;
  let text: string;
  try {
    const response = await fetch(path, {
      method: options.method ?? "GET",
      headers: {
        accept: "application/json",
        ...(options.body !== undefined && { "content-type": "application/json" }),
      },
      ...(options.body !== undefined && { body: JSON.stringify(options.body) }),
      ...(options.signal && { signal: options.signal }),
      // A session that ended answers with a redirect to the sign-in page; that is no answer to a call.
      redirect: "error",
    });
    status = response.status;
    text = await response.text();
  } catch (failed) {
    if (options.signal?.aborted === true) throw failed;
    throw new NoConnection(failed);
  }
  if (status < 200 || status > 299) throw refusalOf(status, text);
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (malformed) {
    throw new NoConnection(malformed);
  }
  return schema.parse(json);
}
