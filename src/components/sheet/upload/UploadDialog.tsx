import { useId, useRef, useState, type DragEvent } from "react";
import type { PDFDocumentProxy } from "pdfjs-dist";
import { ApiRefusal } from "~/client/api";
import { drawingsUrl } from "~/client/plan-calls";
import { uploadDrawing, UploadCancelled, type Upload } from "~/client/upload";
import { Button } from "~/components/ui/Button";
import { Dialog } from "~/components/ui/Dialog";
import { layDrawing } from "~/sheet/edits/scale";
import { NumberField } from "../inputs/NumberField";
import { beginStep, focusDrawing } from "../StepBar";
import { useSheetStore } from "../store";
import { openPdf, rasterPage } from "./pdf-page";

const maxBytes = 25_000_000;
const imageTypes = ["image/png", "image/jpeg", "image/webp"];

type State =
  | { kind: "choosing" }
  | { kind: "page"; pdf: PDFDocumentProxy; fileName: string; page: number }
  | { kind: "reading"; words: string }
  | { kind: "sending"; share: number; upload: Upload };

interface Props {
  open: boolean;
  onClose: () => void;
  planId: string;
}

export function UploadDialog({ open, onClose, planId }: Props) {
  return (
    <Dialog open={open} title="Drawing under the plan" onClose={onClose}>
      <UploadForm planId={planId} onClose={onClose} />
    </Dialog>
  );
}

const whyNot = (failed: unknown): string => {
  if (failed instanceof ApiRefusal)
    return [failed.message, ...failed.faults.map(({ message }) => message)].join(" ");
  return failed instanceof Error ? failed.message : "The drawing could not be used.";
};

function UploadForm({ planId, onClose }: Omit<Props, "open">) {
  const store = useSheetStore();
  const id = useId();
  const [state, setState] = useState<State>({ kind: "choosing" });
  const [problem, setProblem] = useState<string | null>(null);
  const [over, setOver] = useState(false);
  const input = useRef<HTMLInputElement>(null);

  const fail = (message: string) => {
    setProblem(message);
    setState({ kind: "choosing" });
    if (input.current !== null) input.current.value = "";
  };

  const send = async (image: Blob, fileName: string) => {
    if (image.size > maxBytes) {
      fail(
        `The image has ${(image.size / 1e6).toFixed(1)} MB; at most 25 MB are taken. Save it with fewer pixels or as JPEG.`,
      );
      return;
    }
    const upload = uploadDrawing(drawingsUrl(planId), image, fileName, (share) =>
      setState({ kind: "sending", share, upload }),
    );
    setState({ kind: "sending", share: 0, upload });
    try {
      const drawing = await upload.done;
      store.edit("Lay drawing", (whole) => layDrawing(whole, drawing));
      onClose();
      beginStep(store, "set-scale");
      focusDrawing();
    } catch (failed) {
      if (failed instanceof UploadCancelled) setState({ kind: "choosing" });
      else fail(whyNot(failed));
    }
  };

  const choose = async (file: File | undefined) => {
    if (file === undefined) return;
    setProblem(null);
    const isPdf = file.type === "application/pdf" || file.name.toLowerCase().endsWith(".pdf");
    if (isPdf) {
      setState({ kind: "reading", words: "Reading the PDF…" });
      try {
        const pdf = await openPdf(await file.arrayBuffer());
        setState({ kind: "page", pdf, fileName: file.name, page: 1 });
      } catch {
        fail(
          `${file.name} can’t be read as a PDF. It may be damaged or locked with a password; save it anew or as PNG.`,
        );
      }
    } else if (imageTypes.includes(file.type)) {
      await send(file, file.name);
    } else {
      fail(
        `${file.name} is no PNG, JPEG, WebP or PDF. Save the drawing as one of these and choose it again.`,
      );
    }
  };

  const takePage = async ({ pdf, fileName, page }: Extract<State, { kind: "page" }>) => {
    setState({ kind: "reading", words: `Drawing page ${page}…` });
    try {
      await send(await rasterPage(pdf, page), fileName.replace(/\.pdf$/i, "") + `, page ${page}.png`);
    } catch (failed) {
      fail(`Page ${page} of ${fileName} could not be drawn: ${whyNot(failed)}`);
    }
  };

  const dropped = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    void choose(event.dataTransfer.files[0]);
  };

  return (
    <div className="grid gap-4 text-sm">
      {state.kind === "choosing" && (
        <div
          className={`grid gap-2 border-2 border-dashed p-6 ${over ? "border-accent" : "border-rule-strong"}`}
          onDragOver={(event) => {
            event.preventDefault();
            setOver(true);
          }}
          onDragLeave={() => setOver(false)}
          onDrop={dropped}
        >
          <label htmlFor={id} className="field-label">
            Drop a drawing here, or choose a file
          </label>
          <input
            ref={input}
            id={id}
            type="file"
            className="input"
            accept="image/png,image/jpeg,image/webp,application/pdf,.pdf"
            aria-describedby={`${id}-hint`}
            onChange={(event) => void choose(event.target.files?.[0])}
          />
          <p id={`${id}-hint`} className="field-hint">
            PNG, JPEG or WebP of up to 25 MB and 60 megapixels, or a page of a PDF. The grid works without a
            drawing.
          </p>
        </div>
      )}
      {state.kind === "page" && (
        <form
          className="grid gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            void takePage(state);
          }}
        >
          {state.pdf.numPages > 1 ? (
            <NumberField
              label={`Page, 1 to ${state.pdf.numPages}`}
              value={state.page}
              least={1}
              most={state.pdf.numPages}
              onChange={(page) => setState({ ...state, page: Math.round(page) })}
            />
          ) : (
            <p>{state.fileName} has one page.</p>
          )}
          <div className="flex gap-2">
            <Button kind="primary" type="submit">
              Use page {state.page}
            </Button>
            <Button onClick={() => setState({ kind: "choosing" })}>Choose another file</Button>
          </div>
        </form>
      )}
      {state.kind === "reading" && <p role="status">{state.words}</p>}
      {state.kind === "sending" && (
        <div className="grid gap-2">
          <label htmlFor={`${id}-progress`}>
            {state.share < 1 ? "Sending the drawing" : "The server judges the drawing…"}
          </label>
          <progress id={`${id}-progress`} className="w-full accent-accent" max={1} value={state.share} />
          <Button className="justify-self-start" onClick={state.upload.cancel}>
            Cancel
          </Button>
        </div>
      )}
      {problem !== null && (
        <p role="alert" className="message message-over">
          {problem}
        </p>
      )}
    </div>
  );
}
