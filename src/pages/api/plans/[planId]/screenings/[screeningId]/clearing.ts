import { clearingAnswer } from "~/domain/answers/screenings";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { clearingQuery, screeningClearing } from "~/server/screenings/clearing";

export const GET = endpoint(
  {
    action: "screening.read",
    summary:
      "What would clear the flagged positions of a screening: clear positions, allowable currents, single changes, distances.",
    query: clearingQuery,
    responses: { 200: clearingAnswer },
    refusals: ["screening.timed-out", "service.unavailable"],
  },
  async ({ principal, scope, query, request }) =>
    json(await screeningClearing(principal, named(scope, "screening").id, query, request.signal)),
);
