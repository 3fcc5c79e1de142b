import { deliveriesAnswer } from "~/domain/answers/notices";
import { named } from "~/server/auth/scope";
import { noticeDeliveries } from "~/server/deliveries/deliveries";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";

export const GET = endpoint(
  {
    action: "notice.read",
    summary: "How far each message of a notice is.",
    responses: { 200: deliveriesAnswer },
  },
  async ({ principal, scope }) =>
    json({ deliveries: await noticeDeliveries(principal, named(scope, "notice").id) }),
);
