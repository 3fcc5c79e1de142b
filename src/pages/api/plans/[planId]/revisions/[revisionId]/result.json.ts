import { resultAnswer } from "~/domain/answers/screenings";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { frozenText } from "~/server/revisions/revisions";

export const GET = endpoint(
  {
    action: "revision.read",
    summary: "The result that a revision froze, to the byte.",
    responses: { 200: resultAnswer },
  },
  async ({ scope }) =>
    file(await frozenText(named(scope, "revision"), "result"), {
      mediaType: "application/json; charset=utf-8",
    }),
);
