import { Button } from "~/components/ui/Button";
import type { TheirDraft } from "./draft-conflict";

interface Props {
  theirs: TheirDraft;
  busy: boolean;
  onKeepMine: () => void;
  onTakeTheirs: () => void;
}

/** Shows what somebody else has made of the draft meanwhile, and lets the person choose what stands. */
export function DraftConflict({ theirs, busy, onKeepMine, onTakeTheirs }: Props) {
  return (
    <section role="alert" className="message message-over grid gap-3">
      <p>
        Somebody else has changed this draft since you opened it. Nothing of yours is lost: compare, and
        choose what stands.
      </p>
      <div>
        <h3 className="text-sm font-semibold">Their recipients</h3>
        <p className="wrap-anywhere">
          {theirs.recipients.length === 0
            ? "Nobody yet."
            : theirs.recipients.map(({ name, email }) => `${name} (${email})`).join(", ")}
        </p>
      </div>
      <div>
        <h3 className="text-sm font-semibold">Their covering text</h3>
        <p className="whitespace-pre-wrap wrap-anywhere">
          {theirs.coveringText === "" ? "None." : theirs.coveringText}
        </p>
      </div>
      <div className="flex flex-wrap gap-3">
        <Button disabled={busy} onClick={onKeepMine}>
          Save mine over theirs
        </Button>
        <Button disabled={busy} onClick={onTakeTheirs}>
          Take theirs, drop mine
        </Button>
      </div>
    </section>
  );
}
