import { activityCsv } from "~/server/activity/csv";
import { activityFilterInput } from "~/server/activity/view";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";

export const GET = endpoint(
  {
    action: "activity.read",
    summary: "The activity log as CSV, the oldest line first, with the hashes that chain the lines.",
    query: activityFilterInput,
    responses: { 200: { mediaTypes: ["text/csv"] } },
  },
  async ({ principal, query }) => {
    const { body, fileName } = await activityCsv(principal, query);
    return file(body, { mediaType: "text/csv; charset=utf-8; header=present", fileName });
  },
);
