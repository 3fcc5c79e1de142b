import { createHash } from "node:crypto";
import sharp from "sharp";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { findDrawing, listDrawings } from "../../src/server/db/queries/drawings";
import type { PlanRow } from "../../src/server/db/queries/plans";
import { storeDrawing } from "../../src/server/drawings/drawings";
import { listObjectKeys } from "../../src/server/storage/objects";
import { as } from "../fixtures/api-client";
import { floorPicture, pngThatClaims } from "../fixtures/images";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newPlan } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let plan: PlanRow;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Drawing Office"), ["planner"]);
  plan = await newPlan(planner);
});
afterAll(() => app.close());

const upload = (bytes: Buffer, fileName = "floor.png", member = planner) =>
  as(app, member)("post", `/api/plans/${plan.id}/drawings`)
    .set("Content-Type", "application/octet-stream")
    .set("X-File-Name", encodeURIComponent(fileName))
    .send(bytes);
const fetchBytes = (url: string, member = planner) => as(app, member)("get", url).responseType("blob");

/** What must be as before after a refusal. */
const kept = async () => ({
  rows: (await listDrawings(db(), plan.organisationId, plan.id)).map(({ id }) => id),
  keys: (await listObjectKeys("")).sort(),
});

describe("uploading a drawing", () => {
  it.each(["png", "jpeg", "webp"] as const)("stores a %s drawn anew, with a thumbnail", async (format) => {
    const original = await floorPicture().toFormat(format).toBuffer();
    const answer = await upload(original, "C:\\plans\\Étage 1.img");
    expect(answer.status).toBe(201);
    const { id, widthPx, heightPx, fileName, url, thumbnailUrl } = answer.body;
    expect({ widthPx, heightPx, fileName }).toEqual({
      widthPx: 1200,
      heightPx: 800,
      fileName: "Étage 1.img",
    });

    const image = await fetchBytes(url);
    expect(image.headers).toMatchObject({
      "content-type": `image/${format}`,
      "x-content-type-options": "nosniff",
      "cache-control": "private, max-age=31536000, immutable",
    });
    expect((await sharp(image.body).metadata()).format).toBe(format);
    const [wall] = await sharp(image.body)
      .extract({ left: 600, top: 200, width: 1, height: 1 })
      .raw()
      .toBuffer();
    expect(wall).toBeLessThan(80);

    const row = await findDrawing(db(), plan.organisationId, plan.id, id);
    expect(row?.sha256).toBe(createHash("sha256").update(image.body).digest("hex"));
    expect(row?.sizeBytes).toBe(image.body.length);
    expect(await listObjectKeys("")).toEqual(expect.arrayContaining([row?.storageKey, row?.thumbnailKey]));

    const thumbnail = await sharp((await fetchBytes(thumbnailUrl)).body).metadata();
    expect([thumbnail.format, thumbnail.width, thumbnail.height]).toEqual(["webp", 480, 320]);
  });

  it("turns the picture as its orientation says and keeps no metadata", async () => {
    const lyingDown = await floorPicture()
      .withMetadata({ orientation: 6, exif: { IFD0: { Artist: "Maren Oakshott", Software: "Plotter 9" } } })
      .jpeg()
      .toBuffer();
    expect(lyingDown.includes("Maren Oakshott")).toBe(true);
    const { body } = await upload(lyingDown);
    expect([body.widthPx, body.heightPx]).toEqual([800, 1200]);
    const image = (await fetchBytes(body.url)).body as Buffer;
    const { exif, icc, xmp, iptc, orientation } = await sharp(image).metadata();
    expect({ exif, icc, xmp, iptc, orientation }).toEqual({});
    expect(image.includes("Maren Oakshott")).toBe(false);
    // The square of the upper left corner stands in the upper right one after a quarter turn to the right.
    const [red, , blue] = await sharp(image)
      .extract({ left: 766, top: 34, width: 1, height: 1 })
      .raw()
      .toBuffer();
    expect((red ?? 0) - (blue ?? 0)).toBeGreaterThan(60);
  });

  it("takes the first frame of an animation", async () => {
    const frames = await Promise.all(
      ["#ffffff", "#000000"].map((background) =>
        sharp({ create: { width: 60, height: 40, channels: 3, background } })
          .png()
          .toBuffer(),
      ),
    );
    const animation = await sharp(frames, { join: { animated: true } })
      .webp({ delay: [100, 100] })
      .toBuffer();
    expect((await sharp(animation).metadata()).pages).toBe(2);
    const { body } = await upload(animation, "turning.webp");
    expect([body.widthPx, body.heightPx]).toEqual([60, 40]);
    const [first] = await sharp((await fetchBytes(body.url)).body)
      .raw()
      .toBuffer();
    expect(first).toBeGreaterThan(250);
  });

  it("spares a browser that has the image, and nobody else", async () => {
    const { body } = await upload(await floorPicture().png().toBuffer());
    const { etag } = (await fetchBytes(body.url)).headers;
    expect(etag).toMatch(/^"[0-9a-f]{64}"$/);
    expect((await fetchBytes(body.url).set("If-None-Match", String(etag))).status).toBe(304);
    expect((await fetchBytes(body.url).set("If-None-Match", `"${"0".repeat(64)}"`)).status).toBe(200);
  });
});

describe("refusing a file", () => {
  const truncated = async (format: "png" | "jpeg" | "webp") => {
    const whole = await floorPicture().toFormat(format).toBuffer();
    return whole.subarray(0, Math.floor(whole.length * 0.6));
  };
  const damaged = async () => {
    const bytes = await floorPicture().png().toBuffer();
    bytes.fill(0xa5, 200, bytes.length - 100);
    return bytes;
  };
  const svg = '<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"/>';
  const files: [name: string, bytes: () => Promise<Buffer> | Buffer, says: RegExp][] = [
    ["a PDF", () => Buffer.from("%PDF-1.7\n%âãÏÓ\n1 0 obj\n"), /PDF.*pick/],
    ["an SVG", () => Buffer.from(svg), /SVG.*PNG, JPEG or WebP/],
    ["a TIFF", () => floorPicture(90, 60).tiff().toBuffer(), /TIFF.*PNG, JPEG or WebP/],
    ["a HEIF", () => floorPicture(90, 60).heif({ compression: "av1" }).toBuffer(), /HEIF.*PNG, JPEG or WebP/],
    ["a GIF", () => floorPicture(90, 60).gif().toBuffer(), /GIF.*PNG, JPEG or WebP/],
    ["a text", () => Buffer.from("not a picture at all"), /not an image/],
    ["an empty file", () => Buffer.alloc(0), /empty/],
    ["a PNG that was cut short", () => truncated("png"), /damaged or was cut short/],
    ["a JPEG that was cut short", () => truncated("jpeg"), /damaged or was cut short/],
    ["a WebP that was cut short", () => truncated("webp"), /damaged or was cut short/],
    ["a damaged PNG", damaged, /damaged or was cut short/],
    [
      "a PNG's first bytes alone",
      () => Buffer.from("\x89PNG\r\n\x1a\n", "latin1"),
      /damaged or was cut short/,
    ],
    ["a small file of 61 megapixels", () => pngThatClaims(61_000, 1000), /61000 × 1000 pixels; at most 60/],
  ];

  it.each(files)("says what to do with %s and leaves everything as before", async (_name, bytes, says) => {
    const before = await kept();
    const answer = await upload(await bytes(), "floor.png");
    expect([answer.status, answer.body.error.code]).toEqual([422, "drawing.refused"]);
    expect(answer.body.error.message).toMatch(says);
    expect(await kept()).toEqual(before);
  });

  it("takes no more than 25 MB", async () => {
    const before = await kept();
    const answer = await upload(Buffer.alloc(25_000_001));
    expect([answer.status, answer.body.error.code]).toEqual([413, "request.too-large"]);
    expect(await kept()).toEqual(before);
  });

  it("takes the stored objects back when the database refuses the row", async () => {
    const before = await kept();
    const gone = { ...plan, id: crypto.randomUUID() };
    const bytes = await floorPicture(90, 60).png().toBuffer();
    await expect(storeDrawing(planner, gone, { bytes, fileName: "floor.png" })).rejects.toThrow();
    expect(await kept()).toEqual(before);
  });
});

describe("who may", () => {
  it("lets planners upload, office roles look, and hides the plan from everybody else", async () => {
    const organisation = { id: planner.organisationId, name: "Drawing Office" };
    const auditor = await newMember(organisation, ["auditor"]);
    const installer = await newMember(organisation, ["installer"], [plan.siteId]);
    const stranger = await newMember(await newOrganisation("Other Office"), ["planner"]);
    const bytes = await floorPicture(90, 60).png().toBuffer();
    const { body } = await upload(bytes);
    expect((await upload(bytes, "floor.png", auditor)).status).toBe(403);
    expect((await upload(bytes, "floor.png", stranger)).status).toBe(404);
    expect((await fetchBytes(body.url, auditor)).status).toBe(200);
    expect((await fetchBytes(body.url, installer)).status).toBe(403);
    expect((await fetchBytes(body.url, stranger)).status).toBe(404);
    const elsewhere = await newPlan(planner);
    expect((await fetchBytes(`/api/plans/${elsewhere.id}/drawings/${body.id}`)).status).toBe(404);
  });
});
