import { useMutation } from "@tanstack/react-query";
import type { Autosave } from "~/client/autosave";
import { postScreening } from "~/client/plan-calls";
import { Button } from "~/components/ui/Button";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { useDocument } from "./store";

interface Props {
  planId: string;
  autosave: Autosave<PlanDocument>;
}

/** Saves, screens what is saved, and goes to the result. */
export function ScreenButton({ planId, autosave }: Props) {
  const { sensors } = useDocument();
  const screening = useMutation({
    mutationFn: async () => {
      const version = await autosave.flush();
      if (version === null) {
        throw new Error(
          "The plan could not be saved, so it was not screened. See what the save says, then try again.",
        );
      }
      return postScreening(planId, version);
    },
    onSuccess: ({ url }) => location.assign(url),
  });
  const busy = screening.isPending || screening.isSuccess;
  return (
    <div className="flex flex-wrap items-center justify-end gap-x-3">
      {sensors.length === 0 && <p className="text-xs text-muted">Place a sensor first.</p>}
      <Button kind="primary" small disabled={busy || sensors.length === 0} onClick={() => screening.mutate()}>
        {busy ? "Screening…" : "Screen this plan"}
      </Button>
      <p role="alert" className="max-w-80 text-xs text-over empty:hidden">
        {screening.error?.message}
      </p>
    </div>
  );
}
