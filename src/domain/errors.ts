/** Every way in which the service says no. Closed: a new refusal is a new code with its status here. */
export const statusByErrorCode = {
  "request.malformed": 400,
  "request.too-large": 413,
  "request.wrong-type": 415,
  "request.foreign-origin": 403,
  "sign-in.required": 401,
  "sign-in.refused": 403,
  "sign-in.expired": 410,
  "sign-in.too-old": 401,
  "permission.denied": 403,
  "permission.own-edit": 403,
  "rate.exceeded": 429,
  "not-found": 404,
  "method.not-allowed": 405,
  "document.refused": 422,
  "document.conflict": 409,
  "drawing.refused": 422,
  "input.refused": 422,
  "state.conflict": 409,
  "screening.busy": 429,
  "screening.timed-out": 503,
  "service.unavailable": 503,
  internal: 500,
} as const satisfies Record<string, number>;

export type ErrorCode = keyof typeof statusByErrorCode;

/** One thing wrong with an input: where (a path such as `circuits[2].supply.currentA`) and what to do about it. */
export interface Fault {
  path: string;
  message: string;
}

/**
 * A refusal that the person who asked may read. `message` says what happened, where, and what to do;
 * `detail` carries what the client needs to offer a way out (a conflict's present version, say).
 */
export class Refusal extends Error {
  readonly code: ErrorCode;
  readonly faults: readonly Fault[];
  readonly detail: Readonly<Record<string, unknown>>;

  constructor(
    code: ErrorCode,
    message: string,
    options: { faults?: readonly Fault[]; detail?: Record<string, unknown>; cause?: unknown } = {},
  ) {
    super(message, { cause: options.cause });
    this.name = "Refusal";
    this.code = code;
    this.faults = options.faults ?? [];
    this.detail = options.detail ?? {};
  }

  get status(): number {
    return statusByErrorCode[this.code];
  }
}

/** The body of every refused API call. */
export interface ErrorBody {
  error: {
    code: ErrorCode;
    message: string;
    faults?: readonly Fault[];
    detail?: Readonly<Record<string, unknown>>;
  };
}

export const errorBody = (refusal: Refusal): ErrorBody => ({
  error: {
    code: refusal.code,
    message: refusal.message,
    ...(refusal.faults.length > 0 && { faults: refusal.faults }),
    ...(Object.keys(refusal.detail).length > 0 && { detail: refusal.detail }),
  },
});
