import { useId, useMemo, useState } from "react";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { addScheduledCircuits, knownTags, type ScheduleChoices } from "~/sheet/cable-schedule/add-circuits";
import { findColumns, type ColumnMapping } from "~/sheet/cable-schedule/columns";
import { readSchedule } from "~/sheet/cable-schedule/read-schedule";
import { decodeText, guessDelimiter, readTable } from "~/sheet/cable-schedule/read-table";
import { Choice } from "../inputs/Choice";
import { useDocument, useSheetStore } from "../store";
import { ColumnChoices } from "./ColumnChoices";
import { SchedulePreview } from "./SchedulePreview";

/** More than this is no schedule of one floor. */
const maxBytes = 5_000_000;
const maxRows = 5_000;

export function ScheduleDialog({ open, onClose }: { open: boolean; onClose: () => void }) {
  return (
    <Dialog open={open} title="Read a cable schedule" onClose={onClose}>
      <Schedule onClose={onClose} />
    </Dialog>
  );
}

function readText(text: string) {
  try {
    const rows = readTable(text, guessDelimiter(text));
    return { rows, ...findColumns(rows), problem: null };
  } catch (malformed) {
    const why = malformed instanceof Error ? malformed.message : "it is malformed";
    return {
      rows: [],
      mapping: findColumns([]).mapping,
      headingRows: 0,
      problem: `This is no table that can be read: ${why}`,
    };
  }
}

/** Pasted or read from a file, previewed with its errors, and only then taken into the plan. */
function Schedule({ onClose }: { onClose: () => void }) {
  const store = useSheetStore();
  const document = useDocument();
  const textId = useId();
  const fileId = useId();
  const [text, setText] = useState("");
  const [fileProblem, setFileProblem] = useState<string | null>(null);
  const [chosen, setChosen] = useState<ColumnMapping | null>(null);
  const [choices, setChoices] = useState<ScheduleChoices>({ twoCoreKind: "dc", frequencyHz: 50 });
  const read = useMemo(() => readText(text), [text]);
  const mapping = chosen ?? read.mapping;
  const rows = useMemo(
    () =>
      readSchedule(
        read.rows.slice(read.headingRows, read.headingRows + maxRows),
        mapping,
        knownTags(document),
      ),
    [read, mapping, document],
  );
  const sound = rows.filter(({ cable }) => cable !== null);

  const take = (next: string) => {
    setText(next);
    setChosen(null);
    setFileProblem(null);
  };
  const readFile = async (file: File | undefined) => {
    if (file === undefined) return;
    if (file.size > maxBytes) {
      setFileProblem(
        `${file.name} has ${(file.size / 1e6).toFixed(1)} MB; a cable schedule has at most 5 MB.`,
      );
      return;
    }
    take(decodeText(new Uint8Array(await file.arrayBuffer())));
  };

  return (
    <div className="grid gap-4 text-sm">
      <div className="field">
        <label htmlFor={textId} className="field-label">
          Paste from a spreadsheet
        </label>
        <textarea
          id={textId}
          className="input min-h-28 text-sm"
          value={text}
          spellCheck={false}
          placeholder={"Tag\tFrom\tTo\tCores\tSize\tLoad"}
          onChange={(event) => take(event.target.value)}
        />
      </div>
      <div className="field">
        <label htmlFor={fileId} className="field-label">
          or choose a CSV file
        </label>
        <input
          id={fileId}
          type="file"
          accept=".csv,.txt,.tsv,text/csv,text/plain"
          className="input"
          onChange={(event) => void readFile(event.target.files?.[0])}
        />
        <p className="field-hint">
          Separated by tabs, ; or , with decimal point or comma. UTF-8 or Windows-1252.
        </p>
        <p role="alert" className="field-error">
          {fileProblem ?? read.problem}
        </p>
      </div>
      {read.rows.length > 0 && (
        <>
          <ColumnChoices
            headings={read.headingRows > 0 ? (read.rows[read.headingRows - 1]?.cells ?? []) : []}
            columns={Math.max(...read.rows.map(({ cells }) => cells.length))}
            mapping={mapping}
            onChange={setChosen}
          />
          <Choice
            label="Cables with one or two cores whose load does not say so carry"
            value={choices.twoCoreKind}
            options={[
              { value: "dc", label: "DC" },
              { value: "ac1", label: "AC, one phase" },
            ]}
            onChange={(twoCoreKind) => setChoices({ ...choices, twoCoreKind })}
          />
          <Choice
            label="Frequency of AC"
            value={String(choices.frequencyHz)}
            options={["50", "60", "16.7", "400"].map((value) => ({ value, label: `${value} Hz` }))}
            onChange={(frequency) => setChoices({ ...choices, frequencyHz: Number(frequency) })}
          />
          <SchedulePreview rows={rows} />
        </>
      )}
      <div className="flex justify-end gap-2">
        <Button onClick={onClose}>Close</Button>
        <Button
          kind="primary"
          disabled={sound.length === 0}
          onClick={() => {
            store.edit(`Read cable schedule (${sound.length})`, (whole) =>
              addScheduledCircuits(whole, sound, choices),
            );
            onClose();
          }}
        >
          {sound.length === 1 ? "Take 1 circuit in" : `Take ${sound.length} circuits in`}
        </Button>
      </div>
    </div>
  );
}
