import type { InvitationProblem } from "~/domain/invitation";
import { seeOther } from "../http/respond";

/** On to the Desk, or to the invitation's page saying what went wrong. */
export const afterAccepting = (problem: InvitationProblem | null): Response =>
  seeOther(problem === null ? "/desk" : `/invitations/accept?problem=${problem}`);
