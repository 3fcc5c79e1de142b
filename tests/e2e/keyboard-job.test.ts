import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser } from "../support/browser";
import { mailsTo } from "../support/mailbox";
import { services } from "../support/services";
import { activate, chooseIn, tabTo, typeInto } from "./support/keyboard";
import { signIn, somebody } from "./support/person";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

const address = "night-shift@quillhaven.example";

test("the whole job goes by keyboard through the tables", async () => {
  const { page, complaints } = await somebody(browser);
  await signIn(page, "Maren Oakshott");
  await activate(page, "Quillhaven works, north range");
  await page.getByRole("heading", { name: "People to notify" }).waitFor();
  await typeInto(page, /^Name of (the first|another) plan/, "Level 3, by keyboard");
  await activate(page, "Begin the plan");
  await page.waitForURL("**/plans/*");
  await activate(page, "Tables");

  await activate(page, "Add a route");
  const ends = { 1: ["0", "0", "2.8"], 2: ["15", "0", "2.8"] } as const;
  for (const [vertex, place] of Object.entries(ends))
    for (const [at, axis] of (["x", "y", "z"] as const).entries())
      await typeInto(page, new RegExp(`^${axis} of vertex ${vertex} of Route`), place[at] ?? "");
  await activate(page, "Add a circuit");
  await chooseIn(page, /^Route of /, "Route");
  await chooseIn(page, /^Supply of /, "DC");
  await typeInto(page, /^Current of /, "300");
  await typeInto(page, /^Name of circuit /, "Charger feed");

  await chooseIn(page, "Kind of the sensor to add", "Fluxgate");
  await activate(page, "Add a sensor");
  for (const [axis, place] of [
    ["x", "7"],
    ["y", "2"],
    ["z", "1.1"],
  ] as const)
    await typeInto(page, new RegExp(`^${axis} of Fluxgate pillar`), place);

  await page.getByText(/^Saved \d/).waitFor();
  await activate(page, "Screen this plan");
  await page.waitForURL("**/screenings/*");
  const result = await page.getByRole("main").innerText();
  expect(result).toContain("Charger feed");
  expect(result).toMatch(/over/);

  await activate(page, "Write the notice");
  await page.waitForURL("**/notices/*");
  await activate(page, "Add somebody else");
  await typeInto(page, "Name", "Night shift");
  await typeInto(page, "E-mail", address);
  await activate(page, "Issue the notice…");
  await page.getByRole("dialog").waitFor();
  await tabTo(page, "Issue and send");
  await page.keyboard.press("Enter");
  const [mail] = await mailsTo(services(), address);
  expect(mail?.text).toContain("Charger feed");
  expect(complaints).toEqual([]);
});
