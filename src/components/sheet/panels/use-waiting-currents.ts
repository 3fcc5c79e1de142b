import { useEffect, useState } from "react";
import { askClearing } from "~/client/screening";
import type { WaitingCurrent } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";

export type FullCurrents =
  | { kind: "asking" }
  | { kind: "known"; bySensor: readonly { sensorId: string; waiting: readonly WaitingCurrent[] }[] }
  | { kind: "refused"; message: string };

/** The plan has to rest so long before a search begins; each edit starts it anew. */
const restMs = 600;

/** For traced circuits whose current is not known: the current at which each budget would be full. */
export function useWaitingCurrents(document: PlanDocument): FullCurrents {
  const [known, setKnown] = useState<{ of: PlanDocument; full: FullCurrents } | null>(null);
  useEffect(() => {
    const stop = new AbortController();
    const timer = setTimeout(() => {
      askClearing(document, { sensorIds: null, parts: ["currents"] }, stop.signal).then(
        (outcome) => {
          if (stop.signal.aborted) return;
          const full: FullCurrents =
            outcome.kind === "done"
              ? {
                  kind: "known",
                  bySensor: outcome.value.sensors.map(({ id, waiting }) => ({ sensorId: id, waiting })),
                }
              : { kind: "refused", message: outcome.message };
          setKnown({ of: document, full });
        },
        (failed: unknown) => {
          if (stop.signal.aborted) return;
          const message = failed instanceof Error ? failed.message : String(failed);
          setKnown({ of: document, full: { kind: "refused", message } });
        },
      );
    }, restMs);
    return () => {
      clearTimeout(timer);
      stop.abort(new Error("The plan has changed."));
    };
  }, [document]);
  return known?.of === document ? known.full : { kind: "asking" };
}
