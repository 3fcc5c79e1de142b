import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser } from "../support/browser";
import { mailsTo } from "../support/mailbox";
import { appOriginOf } from "../support/test-services";
import { services } from "../support/services";
import { hallPng } from "./support/floor-plan";
import { signIn, somebody } from "./support/person";
import { SheetHand } from "./support/sheet";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

const address = "plant-room@quillhaven.example";

test("a planner draws a plan with the mouse, sees who is over budget, and the site team gets the notice", async () => {
  const { page, complaints } = await somebody(browser);
  await signIn(page, "Maren Oakshott");

  // The site gets somebody to notify, and a plan.
  await page.getByRole("link", { name: "Quillhaven works, north range" }).first().click();
  await page.getByRole("heading", { name: "People to notify" }).waitFor();
  const people = page.getByRole("region", { name: "People to notify" });
  await people.getByLabel("Name").fill("Plant room crew");
  await people.getByLabel("E-mail").fill(address);
  await people.getByLabel("Duty").fill("Mounts the brackets");
  await people.getByRole("button", { name: /add/i }).click();
  await page.getByRole("cell", { name: address }).waitFor();
  await page.getByLabel(/^Name of (the first|another) plan/).fill("Level 2, calibration hall");
  await page.getByRole("button", { name: "Begin the plan" }).click();
  await page.waitForURL("**/plans/*");
  const hand = new SheetHand(page);

  // The floor plan, and its scale by two corners of a wall that is 20 m long.
  await page.getByRole("button", { name: "Upload a drawing…" }).click();
  await page
    .getByLabel("Drop a drawing here, or choose a file")
    .setInputFiles({ name: "hall.png", mimeType: "image/png", buffer: await hallPng() });
  await hand.instruction.getByText("Press on one end of a length that you know").waitFor();
  const unscaled = 20 / 1100;
  await hand.press([50 * unscaled, 50 * unscaled]);
  await hand.press([1050 * unscaled, 50 * unscaled]);
  await page.getByLabel("Known length").fill("20");
  await page.keyboard.press("Enter");
  await page.getByRole("button", { name: "Show all" }).click();

  // Two routes with their currents.
  await hand.step("Trace route");
  await page.locator("[name=step-current]").fill("120");
  for (const at of [
    [2, 3],
    [12, 3],
    [12, 9],
  ] as const)
    await hand.press(at);
  await hand.drawing.focus();
  await page.keyboard.press("Enter");
  await page.getByLabel("Name", { exact: true }).fill("UPS string A");
  await page.keyboard.press("Tab");
  await hand.step("Trace route");
  await page.locator("[name=step-supply]").selectOption("ac3");
  await page.locator("[name=step-current]").fill("200");
  for (const at of [
    [14, 12],
    [20, 12],
  ] as const)
    await hand.press(at);
  await hand.drawing.focus();
  await page.keyboard.press("Enter");
  await page.getByLabel("Name", { exact: true }).fill("Riser feed");
  await page.keyboard.press("Tab");

  // A compass well away, a magnetometer just under the tray.
  await hand.step("Place sensor");
  await page.locator("[name=step-kind]").selectOption({ label: "Electronic compass" });
  await hand.press([6, 6]);
  await hand.step("Place sensor");
  await page.locator("[name=step-kind]").selectOption({ label: "Magnetoresistive sensor" });
  await page.locator("[name=step-height]").fill("2.4");
  await hand.press([7, 3]);
  await hand.saved();

  // The live ledger says so before anything is screened.
  const ledger = page.getByRole("region", { name: "Ledger" });
  await ledger.getByText("over", { exact: true }).waitFor();

  await page.getByRole("button", { name: "Screen this plan" }).click();
  await page.waitForURL("**/screenings/*");
  const positions = page.getByRole("main");
  await positions.getByText("Magnetoresistive sensor").first().waitFor();
  const text = await positions.innerText();
  expect(text.indexOf("Magnetoresistive sensor")).toBeLessThan(text.indexOf("Electronic compass"));
  expect(text).toContain("UPS string A");
  expect(text).toMatch(/from the 2 sources drawn/i);
  const resultUrl = page.url();

  // The notice.
  await page.getByRole("button", { name: "Write the notice" }).click();
  await page.waitForURL("**/notices/*");
  await page.getByLabel(/Plant room crew/).check();
  await page.getByLabel("Covering text").fill("Please leave the bracket at the tray until we have moved it.");
  await page.getByRole("button", { name: "Issue the notice…" }).click();
  await page.getByRole("button", { name: "Issue and send" }).click();
  await page.getByRole("heading", { name: "Screening notice" }).waitFor();

  const [mail] = await mailsTo(services(), address);
  expect(mail?.subject).toContain("Level 2, calibration hall");
  expect(mail?.replyTo).toContain("maren.oakshott@quillhaven.example");
  for (const body of [mail?.text, mail?.html]) {
    expect(body).toContain("PRELIMINARY, NOT FOR MOUNTING");
    expect(body).toContain("Magnetoresistive sensor");
    expect(body).toContain("UPS string A");
    expect(body).toContain("Please leave the bracket at the tray until we have moved it.");
    expect(body).toContain(`${appOriginOf(services())}${new URL(resultUrl).pathname}`);
  }
  expect(mail?.attachments.map(({ filename }) => filename)).toEqual([expect.stringMatching(/\.csv$/)]);
  await page.getByText("sent", { exact: false }).first().waitFor();
  expect(complaints).toEqual([]);
});
