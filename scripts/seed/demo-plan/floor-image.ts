import { readFile } from "node:fs/promises";
import sharp from "sharp";

/** How the drawing lies on the plan: its file states that 2400 px hold 60 m and where the datum is. */
export const floorSheet = {
  widthPx: 3600,
  heightPx: 2520,
  originPx: [300, 2040] as [number, number],
  metresPerPixel: 1 / 60,
  rotationDeg: 0,
};

const drawnAtDpi = 72;
const drawnWidthPx = 2400;

/** The floor plan as a PNG, as an office would export it. */
export async function floorImage(): Promise<Buffer> {
  const svg = await readFile(new URL("../assets/quillhaven-floor.svg", import.meta.url));
  return sharp(svg, { density: (drawnAtDpi * floorSheet.widthPx) / drawnWidthPx })
    .resize({ width: floorSheet.widthPx })
    .flatten({ background: "#fff" })
    .png()
    .toBuffer();
}
