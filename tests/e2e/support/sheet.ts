import type { Locator, Page } from "playwright-core";

interface View {
  scale: number;
  x: number;
  y: number;
}

/** The drafting view as a person handles it with a mouse; places are plan metres. */
export class SheetHand {
  constructor(readonly page: Page) {}

  get drawing(): Locator {
    return this.page.getByRole("application", { name: "Drawing" });
  }

  get instruction(): Locator {
    return this.page.getByTestId("instruction");
  }

  step(name: string): Promise<void> {
    return this.page.getByRole("group", { name: "Steps" }).getByRole("button", { name, exact: true }).click();
  }

  async press([xM, yM]: readonly [number, number]): Promise<void> {
    const { x, y } = await this.pixel([xM, yM]);
    await this.page.mouse.click(x, y);
  }

  async drag(from: readonly [number, number], to: readonly [number, number]): Promise<void> {
    const start = await this.pixel(from);
    const end = await this.pixel(to);
    await this.page.mouse.move(start.x, start.y);
    await this.page.mouse.down();
    await this.page.mouse.move((start.x + end.x) / 2, (start.y + end.y) / 2, { steps: 4 });
    await this.page.mouse.move(end.x, end.y, { steps: 4 });
    await this.page.mouse.up();
  }

  saved(): Promise<void> {
    return this.page.getByText(/^Saved \d/).waitFor();
  }

  private async pixel([xM, yM]: readonly [number, number]): Promise<{ x: number; y: number }> {
    const view = JSON.parse((await this.drawing.getAttribute("data-view")) ?? "{}") as View;
    const box = await this.drawing.boundingBox();
    if (box === null) throw new Error("The drawing is not on the page.");
    return { x: box.x + view.x + xM * view.scale, y: box.y + view.y - yM * view.scale };
  }
}
