import type { Page } from "playwright-core";

/** What a person who hears the page is told that they are on: role and name, as the page itself states them. */
function focusedName(page: Page): Promise<string> {
  return page.evaluate(() => {
    const focused = document.activeElement;
    if (!(focused instanceof HTMLElement) || focused === document.body) return "(the page)";
    const labels =
      focused instanceof HTMLInputElement ||
      focused instanceof HTMLSelectElement ||
      focused instanceof HTMLTextAreaElement
        ? [...(focused.labels ?? [])].map(({ textContent }) => textContent)
        : [];
    return (focused.getAttribute("aria-label") ?? (labels.join(" ") || focused.textContent)).trim();
  });
}

/** Presses Tab until the focus stands on what is called `name`. @throws Error after a whole round of the page */
export async function tabTo(page: Page, name: string | RegExp): Promise<void> {
  const passed: string[] = [];
  for (let presses = 0; presses < 250; presses++) {
    const focused = await focusedName(page);
    if (typeof name === "string" ? focused === name : name.test(focused)) return;
    passed.push(focused);
    await page.keyboard.press("Tab");
  }
  throw new Error(`Tab never came to ${String(name)}; it passed ${[...new Set(passed)].join(" · ")}`);
}

/** Goes to a field by Tab, types over what is in it, and leaves it by Tab. */
export async function typeInto(page: Page, name: string | RegExp, text: string): Promise<void> {
  await tabTo(page, name);
  await page.keyboard.press("ControlOrMeta+A");
  await page.keyboard.type(text);
  await page.keyboard.press("Tab");
}

/** Goes to a list of choices by Tab and takes the choice that begins with `text`, as its letters do. */
export async function chooseIn(page: Page, name: string | RegExp, text: string): Promise<void> {
  await tabTo(page, name);
  await page.keyboard.type(text);
}

export async function activate(page: Page, name: string | RegExp): Promise<void> {
  await tabTo(page, name);
  await page.keyboard.press("Enter");
}
