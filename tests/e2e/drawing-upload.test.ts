import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser } from "../support/browser";
import { onePagePdf } from "./support/pdf";
import { signIn, somebody } from "./support/person";
import { SheetHand } from "./support/sheet";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

test("a page of a PDF becomes the drawing; what is no image is refused with a way on", async () => {
  const { page } = await somebody(browser);
  await signIn(page, "Maren Oakshott");
  await page.getByRole("link", { name: "Quillhaven works, north range" }).first().click();
  await page.getByLabel(/^Name of (the first|another) plan/).fill("Level 4, from a PDF");
  await page.getByRole("button", { name: "Begin the plan" }).click();
  await page.waitForURL("**/plans/*");
  const hand = new SheetHand(page);
  await page.getByRole("button", { name: "Upload a drawing…" }).click();
  const file = page.getByLabel("Drop a drawing here, or choose a file");

  // Text under an image's name and type: the server judges by content, and the dialog stays for another try.
  await file.setInputFiles({
    name: "plan.png",
    mimeType: "image/png",
    buffer: Buffer.from("no picture at all"),
  });
  await page.getByRole("alert").getByText(/PNG/).waitFor();
  await file.setInputFiles({
    name: "broken.pdf",
    mimeType: "application/pdf",
    buffer: Buffer.from("%PDF-1.4 cut"),
  });
  await page
    .getByRole("alert")
    .getByText(/can’t be read as a PDF/)
    .waitFor();

  await file.setInputFiles({ name: "floor.pdf", mimeType: "application/pdf", buffer: onePagePdf() });
  await page.getByRole("button", { name: "Use page 1" }).click();
  await hand.instruction.getByText("Press on one end of a length that you know").waitFor();
  await hand.saved();

  const document = (await (
    await page.request.get(`/api${new URL(page.url()).pathname}/document`)
  ).json()) as {
    document: { drawing: { sheet: { drawingId: string; widthPx: number; heightPx: number } } };
  };
  const { drawingId, widthPx, heightPx } = document.document.drawing.sheet;
  expect(widthPx / heightPx).toBeCloseTo(595 / 420, 2);
  const image = await page.request.get(`/api${new URL(page.url()).pathname}/drawings/${drawingId}`);
  expect(image.headers()["content-type"]).toBe("image/png");
});
