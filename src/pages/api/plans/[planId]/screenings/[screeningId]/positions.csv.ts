import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { screeningCsv } from "~/server/screenings/screenings";

export const GET = endpoint(
  {
    action: "screening.read",
    summary: "The positions of a screening as CSV, one line for each limit.",
    responses: { 200: { mediaTypes: ["text/csv"] } },
  },
  async ({ principal, scope }) => {
    const { text, fileName } = await screeningCsv(principal, named(scope, "screening").id);
    return file(text, { mediaType: "text/csv; charset=utf-8; header=present", fileName });
  },
);
