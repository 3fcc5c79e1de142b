import { resultAnswer } from "~/domain/answers/screenings";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { screeningResultText } from "~/server/screenings/screenings";

export const GET = endpoint(
  {
    action: "screening.read",
    summary: "The result of a screening, byte for byte as it was stored.",
    responses: { 200: resultAnswer },
  },
  async ({ principal, scope }) =>
    file(await screeningResultText(principal, named(scope, "screening").id), {
      mediaType: "application/json; charset=utf-8",
    }),
);
