import type { z } from "zod";
import type { ErrorCode } from "~/domain/errors";
import type { Action } from "~/domain/permissions";

/** One way of answering: JSON by its schema, bytes of these media types, or nothing to read. */
export type AnswerBody = z.ZodType | { mediaTypes: readonly string[] } | "empty";

/** What an endpoint answers where it does not refuse, by status. */
export type Responses = Readonly<Partial<Record<200 | 201 | 202 | 204 | 303 | 304, AnswerBody>>>;

/** A body that the handler reads by itself: its media types and, of JSON, what it must be. */
export interface OwnBody {
  mediaTypes: readonly string[];
  schema?: z.ZodType;
}

/** What an endpoint is, for its guard, its parser and the published description. */
export interface EndpointDefinition {
  /** What the caller must be allowed to do; the guard checks it before anything is read. */
  action: Action;
  /** One sentence for the published API description. */
  summary: string;
  body?: z.ZodType | undefined;
  query?: z.ZodType | undefined;
  ownBody?: OwnBody | undefined;
  /** True where a page posts a plain HTML form here. */
  form?: boolean | undefined;
  responses?: Responses | undefined;
  /** Refusals of its own, beside those that every endpoint of its kind gives. */
  refusals?: readonly ErrorCode[] | undefined;
}
