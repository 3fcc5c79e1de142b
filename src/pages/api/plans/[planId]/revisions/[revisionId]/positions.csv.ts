import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { revisionCsv } from "~/server/revisions/revisions";

export const GET = endpoint(
  {
    action: "revision.read",
    summary: "The positions of a revision as CSV, one line for each limit.",
    responses: { 200: { mediaTypes: ["text/csv"] } },
  },
  async ({ scope }) => {
    const { text, fileName } = await revisionCsv(named(scope, "revision"));
    return file(text, { mediaType: "text/csv; charset=utf-8; header=present", fileName });
  },
);
