import { healthAnswer } from "~/domain/answers/people";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { checkHealth } from "~/server/health/health";

export const GET = endpoint(
  {
    action: "health.read",
    summary: "Whether the service can work: 200 when its database answers.",
    responses: { 200: healthAnswer },
    refusals: ["service.unavailable"],
  },
  async () => {
    await checkHealth();
    return json({ status: "ok" });
  },
);
