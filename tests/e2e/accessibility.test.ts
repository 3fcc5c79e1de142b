import { AxeBuilder } from "@axe-core/playwright";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launchBrowser } from "../support/browser";
import { signIn, somebody } from "./support/person";

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

/** What axe finds wrong with the page, a line each. */
async function faultsOf(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  return violations.flatMap(({ id, nodes }) =>
    nodes.map(({ target }) => `${page.url()} ${id}: ${target.join(" ")}`),
  );
}

/** Nothing may stand out of the page sideways: a phone's reader would have to push it to and fro. */
const widerThanScreen = (page: Page): Promise<boolean> =>
  page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth);

async function addressesFor(page: Page): Promise<string[]> {
  await page.goto("/desk");
  const hrefs = await page
    .getByRole("main")
    .getByRole("link")
    .evaluateAll((links) => links.map((link) => new URL((link as HTMLAnchorElement).href).pathname));
  const first = (start: string, without: string) =>
    hrefs.find((path) => path.startsWith(start) && !path.includes(without)) ?? "";
  return [
    "/desk",
    "/sites/new",
    first("/sites/", "/new"),
    first("/plans/", "/screenings/"),
    hrefs.find((path) => path.includes("/screenings/")) ?? "",
    "/catalogue",
    "/account",
  ].filter((path) => path !== "");
}

test.each([
  { widthPx: 360, colorScheme: "light" },
  { widthPx: 768, colorScheme: "dark" },
  { widthPx: 1440, colorScheme: "light" },
] as const)(
  "axe finds nothing at $widthPx px, $colorScheme, and nothing stands out sideways",
  async (look) => {
    const { page, complaints } = await somebody(browser, {
      viewport: { width: look.widthPx, height: 800 },
      colorScheme: look.colorScheme,
    });
    const faults: string[] = [];
    const visit = async (path: string) => {
      await page.goto(path);
      await page.getByRole("heading", { level: 1 }).waitFor({ state: "attached" });
      if (await page.getByRole("main").locator("astro-island").count())
        await page.waitForLoadState("networkidle");
      faults.push(...(await faultsOf(page)));
      if (await widerThanScreen(page)) faults.push(`${path} is wider than ${look.widthPx} px`);
    };
    for (const path of ["/", "/sign-in", "/sign-in/link?token=spoilt"]) await visit(path);
    await signIn(page, "Maren Oakshott");
    const addresses = await addressesFor(page);
    expect(addresses).toHaveLength(7);
    for (const path of addresses) await visit(path);
    expect(faults).toEqual([]);
    expect(complaints).toEqual([]);
  },
);
