import { z } from "zod";
import { ApiRefusal } from "~/client/api";

const theirDraft = z.object({
  draftTag: z.string(),
  coveringText: z.string(),
  recipients: z.array(z.object({ name: z.string(), email: z.string() })),
});

/** A draft as somebody else has left it meanwhile. */
export type TheirDraft = z.output<typeof theirDraft>;

/** What somebody else has made of the draft, where that is why a save was refused. */
export function conflictOf(error: unknown): TheirDraft | null {
  if (!(error instanceof ApiRefusal) || error.code !== "state.conflict") return null;
  return theirDraft.safeParse(error.detail).data ?? null;
}
