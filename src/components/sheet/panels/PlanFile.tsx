import { useId, useState } from "react";
import { Button } from "~/components/ui/Button";
import { importedInto } from "~/sheet/edits/import-document";
import { useEditable, useSheetStore } from "../store";

/** Faults listed of a file that is refused; more would help nobody. */
const listedFaults = 20;

interface Refused {
  message: string;
  faults: readonly { path: string; message: string }[];
}

function download(fileName: string, text: string): void {
  const url = URL.createObjectURL(new Blob([text], { type: "application/json" }));
  const link = document.createElement("a");
  link.href = url;
  link.download = fileName;
  link.click();
  URL.revokeObjectURL(url);
}

const fileNameOf = (planName: string): string =>
  `${planName.replace(/[^\p{L}\p{N} ._-]+/gu, "").trim() || "plan"}.json`;

/** The plan document as a file, out and in; what comes in is judged first and can be undone. */
export function PlanFile() {
  const store = useSheetStore();
  const editable = useEditable();
  const id = useId();
  const [refused, setRefused] = useState<Refused | null>(null);
  const take = async (file: File) => {
    const { readPlanDocument, MAX_DOCUMENT_BYTES } = await import("~/domain/plan-document/read");
    if (file.size > MAX_DOCUMENT_BYTES) {
      setRefused({ message: `${file.name} is larger than ${MAX_DOCUMENT_BYTES / 1e6} MB.`, faults: [] });
      return;
    }
    const read = readPlanDocument(await file.text());
    if (read.ok) {
      setRefused(null);
      store.edit(`Import ${file.name}`, (present) => importedInto(present, read.document), []);
      return;
    }
    const message =
      "notJson" in read
        ? `${file.name} is not JSON: ${read.notJson}.`
        : `${file.name} was not taken: something in it does not fit.`;
    setRefused({ message, faults: read.faults });
  };
  return (
    <fieldset className="grid gap-2">
      <legend className="mb-1 text-sm font-semibold">Plan document</legend>
      <Button
        small
        className="justify-self-start"
        onClick={() => {
          const { document } = store.get().session;
          download(fileNameOf(document.name), `${JSON.stringify(document, null, 2)}\n`);
        }}
      >
        Export as JSON
      </Button>
      {editable && (
        <div className="grid gap-1">
          <label htmlFor={id} className="text-sm">
            Import from JSON. It takes the place of all that is drawn; Undo brings that back.
          </label>
          <input
            id={id}
            type="file"
            accept="application/json,.json"
            className="text-sm"
            onChange={(event) => {
              const { files } = event.target;
              const [file] = files ?? [];
              if (file !== undefined) {
                take(file).catch((failed: unknown) =>
                  setRefused({ message: `${file.name} could not be read: ${String(failed)}.`, faults: [] }),
                );
              }
              event.target.value = "";
            }}
          />
        </div>
      )}
      {refused !== null && (
        <div className="message message-undecided text-sm" role="alert">
          <p>{refused.message}</p>
          <ul className="mt-1 list-disc pl-5">
            {refused.faults.slice(0, listedFaults).map(({ path, message }) => (
              <li key={`${path}: ${message}`}>
                <span className="font-semibold">{path}</span>: {message}
              </li>
            ))}
          </ul>
        </div>
      )}
    </fieldset>
  );
}
