import { QueryClient, QueryClientProvider, useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { NoConnection } from "~/client/api";
import { loadDraft } from "~/client/draft-store";
import { getPlan, queryKeys } from "~/client/plan-calls";
import { Button } from "~/components/ui/Button";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { History } from "~/sheet/history";
import { Sheet } from "./Sheet";
import type { SheetProps } from "./props";
import { resume, resumeOffline, type Start } from "./save/resume";

async function start(planId: string, userId: string, signal: AbortSignal): Promise<Start> {
  // A browser that keeps no drafts has none to restore.
  const draft = await loadDraft<PlanDocument, History>(userId, planId).catch(() => null);
  try {
    return resume(await getPlan(planId, signal), draft);
  } catch (failed) {
    if (failed instanceof NoConnection && draft !== null) return resumeOffline(draft);
    throw failed;
  }
}

function Loader(props: SheetProps) {
  const { planId, userId } = props;
  const plan = useQuery({
    queryKey: queryKeys.document(planId),
    queryFn: ({ signal }) => start(planId, userId, signal),
    staleTime: Infinity,
    refetchOnWindowFocus: false,
    refetchOnReconnect: false,
    retry: 1,
  });
  if (plan.isSuccess) return <Sheet {...props} start={plan.data} />;
  return (
    <div className="m-4 grid justify-items-start gap-3">
      {plan.isError ? (
        <>
          <p role="alert" className="message message-over">
            The plan could not be loaded. {plan.error.message}
          </p>
          <Button onClick={() => void plan.refetch()}>Try again</Button>
        </>
      ) : (
        <p role="status">Loading the plan…</p>
      )}
    </div>
  );
}

/** The sheet of one plan. */
export function SheetIsland(props: SheetProps) {
  const [queries] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={queries}>
      <Loader {...props} />
    </QueryClientProvider>
  );
}
