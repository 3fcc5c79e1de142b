import type { PDFDocumentProxy } from "pdfjs-dist";
import workerUrl from "pdfjs-dist/build/pdf.worker.min.mjs?url";

/** At most so many pixels are rastered; the server takes no more. */
export const maxPixels = 60_000_000;

/** Dots per inch at which a page is rastered where that fits. */
const wantedDpi = 200;
const pointsPerInch = 72;

/** pdf.js is large and rarely needed: it comes when the first PDF is chosen. */
export async function openPdf(bytes: ArrayBuffer): Promise<PDFDocumentProxy> {
  const { getDocument, GlobalWorkerOptions } = await import("pdfjs-dist");
  GlobalWorkerOptions.workerSrc = workerUrl;
  return getDocument({ data: bytes, enableXfa: false }).promise;
}

/** Pixels per point for a page of that size in points: 200 dpi, or less so that the image stays within `maxPixels`. */
export function pdfScale(widthPt: number, heightPt: number): number {
  const wanted = wantedDpi / pointsPerInch;
  const most = Math.sqrt(maxPixels / (widthPt * heightPt));
  // A page exactly at the limit may round up to one pixel row more.
  return Math.min(wanted, most * 0.999);
}

const toPng = (canvas: HTMLCanvasElement): Promise<Blob> =>
  new Promise((resolve, reject) => {
    canvas.toBlob(
      (blob) =>
        blob === null ? reject(new Error("The page could not be turned into an image.")) : resolve(blob),
      "image/png",
    );
  });

/** The page (from 1) as a PNG on white. */
export async function rasterPage(pdf: PDFDocumentProxy, pageNumber: number): Promise<Blob> {
  const page = await pdf.getPage(pageNumber);
  const { width, height } = page.getViewport({ scale: 1 });
  const viewport = page.getViewport({ scale: pdfScale(width, height) });
  const canvas = document.createElement("canvas");
  canvas.width = Math.floor(viewport.width);
  canvas.height = Math.floor(viewport.height);
  await page.render({ canvas, viewport, background: "#ffffff" }).promise;
  const png = await toPng(canvas);
  // Frees the pixels at once; a large canvas would otherwise wait for the collector.
  canvas.width = 0;
  return png;
}
