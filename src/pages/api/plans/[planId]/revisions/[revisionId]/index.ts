import { revisionAnswer } from "~/domain/answers/revisions";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { revisionState } from "~/server/revisions/revisions";

export const GET = endpoint(
  {
    action: "revision.read",
    summary: "A revision: its state, its hashes and what was decided on each position.",
    responses: { 200: revisionAnswer },
  },
  async ({ scope }) => json(await revisionState(named(scope, "plan"), named(scope, "revision"))),
);
