import { useEffect, useState } from "react";
import { Ledger } from "~/components/ledger/Ledger";
import { Button } from "~/components/ui/Button";
import { beginSession } from "~/sheet/session";
import { Drawing } from "./canvas/Drawing";
import { InstructionLine } from "./InstructionLine";
import { SidePanel } from "./panels/SidePanel";
import { ConflictDialog } from "./save/ConflictDialog";
import { RefusedFaults, SaveStateLine } from "./save/SaveStateLine";
import type { Start } from "./save/resume";
import { useAutosave } from "./save/use-autosave";
import { ScheduleDialog } from "./schedule/ScheduleDialog";
import { ScreenButton } from "./ScreenButton";
import { SectionStrip } from "./SectionStrip";
import type { SheetProps } from "./props";
import { StepBar, UndoButtons } from "./StepBar";
import {
  SheetContext,
  SheetStore,
  useEditable,
  useSelection,
  useSheet,
  useSheetStore,
  useShownDocument,
} from "./store";
import { Tables } from "./tables/Tables";
import { UploadDialog } from "./upload/UploadDialog";
import { useLive } from "./use-live";
import { useShortcuts } from "./use-shortcuts";

/** Smaller screens show the plan; drawing on them would be guesswork. */
const wideEnough = "(min-width: 40rem)";

interface Props extends SheetProps {
  start: Start;
}

export function Sheet(props: Props) {
  const { start, mayEdit, siteEarth, phaseLabels } = props;
  const [store] = useState(
    () =>
      new SheetStore(
        beginSession(start.document, start.history),
        mayEdit && matchMedia(wideEnough).matches,
        siteEarth,
        phaseLabels.split("/"),
      ),
  );
  useEffect(() => {
    const wide = matchMedia(wideEnough);
    const changed = () => store.update({ editable: mayEdit && wide.matches });
    wide.addEventListener("change", changed);
    return () => wide.removeEventListener("change", changed);
  }, [store, mayEdit]);
  useLive(store);
  useShortcuts(store);
  return (
    <SheetContext value={store}>
      <Layout {...props} />
    </SheetContext>
  );
}

function Layout({ planId, planName, userId, mayEdit, mayScreen, siteEarth, start }: Props) {
  const store = useSheetStore();
  const editable = useEditable();
  const shown = useSheet((state) => state.shown);
  const [dialog, setDialog] = useState<"upload" | "schedule" | null>(null);
  const { state, autosave, keepsDrafts } = useAutosave({ store, planId, userId, saved: start.saved });
  const mine = useSheet(({ session }) => session.document);
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      <h1 className="sr-only">{planName}</h1>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1 px-3 py-1">
        <StepBar />
        <UndoButtons />
        <div role="group" aria-label="View" className="flex items-center gap-1">
          <ViewButton name="drawing">Drawing</ViewButton>
          <ViewButton name="tables">Tables</ViewButton>
          {editable && (
            <Button small onClick={() => setDialog("upload")}>
              Upload a drawing…
            </Button>
          )}
        </div>
        <div className="ml-auto flex flex-wrap items-center justify-end gap-x-4 gap-y-1">
          {mayEdit && (
            <SaveStateLine state={state} keepsDrafts={keepsDrafts} onRetry={() => autosave.retry()} />
          )}
          {mayScreen && <ScreenButton planId={planId} autosave={autosave} />}
        </div>
      </div>
      <Notes start={start} mayEdit={mayEdit} />
      <RefusedFaults state={state} />
      {state.kind === "conflict" && (
        <ConflictDialog
          base={autosave.base}
          mine={mine}
          theirs={state.theirs.document}
          theirName={state.theirs.savedByName}
          onMerged={(merged) => {
            const { theirs } = state;
            store.adopt(merged);
            autosave.rebase(theirs, store.get().session.document);
          }}
        />
      )}
      {shown === "drawing" && <InstructionLine />}
      <Announcement />
      <div className="grid min-h-0 flex-1 lg:grid-cols-[minmax(0,1fr)_26rem]">
        <div className="flex min-h-0 min-w-0 flex-col border-rule lg:border-r">
          {shown === "drawing" ? (
            <>
              <Drawing planId={planId} />
              <SectionStrip />
            </>
          ) : (
            <Tables />
          )}
        </div>
        <aside aria-label="Ledger and properties" className="flex min-h-0 min-w-0 flex-col">
          <LiveLedger />
          <SidePanel siteEarth={siteEarth} onOpenSchedule={() => setDialog("schedule")} />
        </aside>
      </div>
      <UploadDialog open={dialog === "upload"} onClose={() => setDialog(null)} planId={planId} />
      <ScheduleDialog open={dialog === "schedule"} onClose={() => setDialog(null)} />
    </div>
  );
}

/** Tells whoever can't see the sheet what the last edit was. */
function Announcement() {
  const announcement = useSheet(({ session }) => session.announcement);
  return (
    <p className="sr-only" aria-live="polite">
      {announcement}
    </p>
  );
}

function ViewButton({ name, children }: { name: "drawing" | "tables"; children: string }) {
  const store = useSheetStore();
  const shown = useSheet((state) => state.shown);
  return (
    <button
      type="button"
      aria-pressed={shown === name}
      className="min-h-9 cursor-pointer border-b-2 border-transparent px-2 text-sm hover:border-rule-strong aria-pressed:border-accent aria-pressed:font-semibold"
      onClick={() => store.update({ shown: name })}
    >
      {children}
    </button>
  );
}

const clock = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  hour: "2-digit",
  minute: "2-digit",
});

function Notes({ start, mayEdit }: { start: Start; mayEdit: boolean }) {
  const editable = useEditable();
  const [seen, setSeen] = useState(false);
  return (
    <>
      {mayEdit && !editable && (
        <p className="mx-3 my-1 text-sm text-muted">
          This screen is too small to draw on; open the plan on a wider one to change it.
        </p>
      )}
      {!mayEdit && (
        <p className="mx-3 my-1 text-sm text-muted">You may read this plan; planners change it.</p>
      )}
      {start.restoredFrom !== null && !seen && (
        <div role="status" className="message message-undecided mx-3 my-1 flex flex-wrap items-center gap-3">
          <p>
            Your edits up to {clock.format(new Date(start.restoredFrom))} had not reached the server. They
            were kept on this device and are back on the sheet; Undo takes them off.
          </p>
          <Button small onClick={() => setSeen(true)}>
            Understood
          </Button>
        </div>
      )}
    </>
  );
}

function LiveLedger() {
  const store = useSheetStore();
  const document = useShownDocument();
  const selection = useSelection();
  const live = useSheet((state) => state.live);
  const litId = useSheet((state) => state.litId);
  const [selected] = selection.filter((item) => item.kind === "sensor");
  return (
    <div
      className="min-h-40 flex-1 overflow-y-auto p-3"
      tabIndex={0}
      role="region"
      aria-label="Ledger of sensors"
    >
      <Ledger
        document={document}
        live={live}
        litId={litId}
        onLight={(id) => store.light(id)}
        selectedSensorId={selected?.id ?? null}
        onSelect={(id) => store.select([{ kind: "sensor", id }])}
      />
    </div>
  );
}
