import type { Browser, BrowserContextOptions, Page } from "playwright-core";
import { appOriginOf } from "../../support/test-services";
import { services } from "../../support/services";

export interface Person {
  page: Page;
  /** Errors that the browser wrote while this person worked; a test expects none. */
  complaints: string[];
}

/** A browser window of its own, in which nobody is signed in. */
export async function somebody(browser: Browser, options: BrowserContextOptions = {}): Promise<Person> {
  const context = await browser.newContext({
    baseURL: appOriginOf(services()),
    viewport: { width: 1440, height: 900 },
    ...options,
  });
  const page = await context.newPage();
  const complaints: string[] = [];
  page.on("pageerror", (error) => complaints.push(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") complaints.push(message.text());
  });
  return { page, complaints };
}

/** Signs in by single sign-on as one of the demo's people, from the front page to the Desk. */
export async function signIn(page: Page, name: string): Promise<void> {
  await page.goto("/sign-in");
  await page.getByRole("link", { name: "Sign in with your organisation" }).click();
  await page.getByRole("button", { name: new RegExp(name) }).click();
  await page.waitForURL("**/desk");
}
