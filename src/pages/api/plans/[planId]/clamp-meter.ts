import { clampMeterAnswer } from "~/domain/answers/clamp-meter";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { clampMeterInput, clampMeterReadingOf } from "~/server/screenings/clamp-meter";

export const POST = endpoint(
  {
    action: "clamp-meter.read",
    summary: "The clamp-meter reading to expect around a loop drawn in a plan; nothing of it is kept.",
    body: clampMeterInput,
    responses: { 200: clampMeterAnswer },
    refusals: ["state.conflict", "document.refused", "screening.timed-out", "service.unavailable"],
  },
  async ({ scope, body, request }) =>
    json(await clampMeterReadingOf(named(scope, "plan"), body, request.signal)),
);
