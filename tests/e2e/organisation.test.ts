import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser } from "../support/browser";
import { mailsTo } from "../support/mailbox";
import { services } from "../support/services";
import { signIn, somebody } from "./support/person";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

const address = "signe.aldous@quillhaven.example";

test("an admin invites an installer, who accepts on a phone; the admin removes and erases them again", async () => {
  const { page, complaints } = await somebody(browser);
  await signIn(page, "Henrik Sallow");
  await page.goto("/organisation");
  await page.getByText("Invite somebody").click();
  const invitations = page.getByRole("region", { name: "Invitations" });
  await invitations.getByLabel("Name").fill("Signe Aldous");
  await invitations.getByLabel("E-mail").fill(address);
  await invitations.getByRole("checkbox", { name: /^installer/ }).check();
  await invitations.getByRole("checkbox", { name: "Quillhaven works, north range" }).check();
  await invitations.getByRole("button", { name: "Send the invitation" }).click();
  await invitations.getByRole("row", { name: /Signe Aldous/ }).waitFor();

  const [mail] = await mailsTo(services(), address);
  const link = /http\S+\/invitations\/accept\?token=[\w-]{43}/.exec(mail?.text ?? "")?.[0] ?? "";
  const phone = await somebody(browser, { viewport: { width: 360, height: 740 } });
  await phone.page.goto(link);
  await phone.page.getByRole("heading", { name: /^Invitation to Quillhaven/ }).waitFor();
  await phone.page.getByRole("button", { name: "Accept and sign in" }).click();
  await phone.page.waitForURL("**/desk");
  await phone.page.getByRole("link", { name: "Quillhaven works, north range" }).first().waitFor();

  await page.reload();
  await invitations.getByText("accepted", { exact: true }).waitFor();
  const members = page.getByRole("region", { name: "Members", exact: true });
  const signe = members.getByRole("listitem").filter({ hasText: address });
  await signe.locator("summary", { hasText: "Remove" }).click();
  await signe.getByRole("button", { name: "Remove Signe Aldous" }).click();
  const former = page.getByRole("region", { name: "Former members" });
  await former.getByText("Signe Aldous", { exact: true }).waitFor();
  await phone.page.goto("/desk");
  await phone.page.waitForURL("**/sign-in?*");

  await former.locator("summary", { hasText: "Erase name" }).click();
  await former.getByRole("button", { name: "Erase Signe Aldous for good" }).click();
  await former.getByText("a former member", { exact: true }).waitFor();
  expect(await page.getByRole("main").innerText()).not.toContain("Signe Aldous");

  await page.goto("/organisation/activity?event=member.erased");
  await page.getByRole("cell", { name: /erased name and address of a former member/ }).waitFor();
  for (const path of ["", "/deliveries", "/activity", "/archive"]) {
    await page.setViewportSize({ width: 360, height: 740 });
    await page.goto(`/organisation${path}`);
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect([path, overflow]).toEqual([path, 0]);
  }
  expect([...complaints, ...phone.complaints]).toEqual([]);
});
