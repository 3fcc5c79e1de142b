import type { SaveState } from "~/client/autosave";
import { Button } from "~/components/ui/Button";
import type { PlanDocument } from "~/domain/plan-document/plan-document";

const clock = new Intl.DateTimeFormat("en-GB", { hour: "2-digit", minute: "2-digit" });

/** The state of saving in words. */
export function saveWords(state: SaveState<PlanDocument>): string {
  switch (state.kind) {
    case "saved":
      return `Saved ${clock.format(state.at)}`;
    case "waiting":
      return "Edited, saving soon";
    case "saving":
      return "Saving…";
    case "no-connection":
      return "Not saved: no connection, kept on this device";
    case "conflict":
      return `Not saved: ${state.theirs.savedByName} saved this plan too`;
    case "refused":
      return "Not saved: the plan is refused as it stands";
    case "signed-out":
      return "Not saved: you are signed out, kept on this device";
  }
}

interface Props {
  state: SaveState<PlanDocument>;
  keepsDrafts: boolean;
  onRetry: () => void;
}

export function SaveStateLine({ state, keepsDrafts, onRetry }: Props) {
  const troubled = state.kind !== "saved" && state.kind !== "waiting" && state.kind !== "saving";
  return (
    <div className="flex flex-wrap items-center gap-x-2 text-sm">
      <p
        role="status"
        aria-live="polite"
        data-testid="save-state"
        className={troubled ? "font-semibold text-over" : "text-muted"}
      >
        {troubled && <span aria-hidden="true">▲ </span>}
        {saveWords(state)}
      </p>
      {state.kind === "no-connection" && (
        <Button small onClick={onRetry}>
          Try now
        </Button>
      )}
      {state.kind === "signed-out" && (
        <a className="underline" href={`/sign-in?returnTo=${encodeURIComponent(location.pathname)}`}>
          Sign in again
        </a>
      )}
      {!keepsDrafts && (
        <p className="text-undecided">
          This browser keeps no drafts: don’t close the page while anything is unsaved.
        </p>
      )}
    </div>
  );
}

/** What the server found wrong, with its places. */
export function RefusedFaults({ state }: { state: SaveState<PlanDocument> }) {
  if (state.kind !== "refused") return null;
  return (
    <div className="message message-over mx-3 my-2" role="alert">
      <p>{state.message} It is kept on this device and saved as soon as this is mended:</p>
      <ul className="mt-1 list-disc pl-5">
        {state.faults.slice(0, 8).map(({ path, message }) => (
          <li key={`${path}: ${message}`}>
            <span className="font-semibold">{path}</span>: {message}
          </li>
        ))}
      </ul>
    </div>
  );
}
