import sharp, { type Sharp, type SharpOptions } from "sharp";
import { Refusal } from "~/domain/errors";
import { type DrawingFormat, drawingFormat, mediaTypes, unreadable } from "./image-kind";

export const maxUploadBytes = 25_000_000;
export const maxPixels = 60_000_000;
const thumbnailSidePx = 480;

export interface EncodedImage {
  bytes: Uint8Array;
  mediaType: string;
  widthPx: number;
  heightPx: number;
}

export interface EncodedDrawing {
  image: EncodedImage;
  thumbnail: EncodedImage;
}

/** Qualities at which lines of one pixel on a scanned plan stay sharp. */
const encoders: Record<DrawingFormat, (image: Sharp) => Sharp> = {
  png: (image) => image.png({ compressionLevel: 7 }),
  jpeg: (image) => image.jpeg({ quality: 92, chromaSubsampling: "4:4:4", mozjpeg: false }),
  webp: (image) => image.webp({ quality: 92, effort: 2 }),
};

const options: SharpOptions = { failOn: "error", limitInputPixels: maxPixels, pages: 1, autoOrient: true };

/** Reads the header only. @throws Refusal drawing.refused */
async function checkHeader(bytes: Uint8Array, format: DrawingFormat): Promise<void> {
  const header = await sharp(bytes, { ...options, limitInputPixels: false })
    .metadata()
    .catch((error: unknown) => {
      throw unreadable(error);
    });
  if (header.format !== format) throw unreadable();
  if (header.width * header.height > maxPixels)
    throw new Refusal(
      "drawing.refused",
      `The image has ${String(header.width)} × ${String(header.height)} pixels; at most ${String(maxPixels / 1e6)} megapixels are taken. Save it at a lower resolution or cut it to the floor.`,
      { detail: { widthPx: header.width, heightPx: header.height, maxPixels } },
    );
}

async function encode(image: Sharp, mediaType: string): Promise<EncodedImage> {
  const { data, info } = await image.toBuffer({ resolveWithObject: true }).catch((error: unknown) => {
    throw unreadable(error);
  });
  return { bytes: data, mediaType, widthPx: info.width, heightPx: info.height };
}

/**
 * Judges an uploaded image by its content and draws it anew: turned as its EXIF orientation says, first frame only,
 * in sRGB, without any metadata. PNG stays PNG, JPEG JPEG, WebP WebP; the thumbnail is a WebP of at most 480 px a side.
 * @throws Refusal drawing.refused
 */
export async function reEncode(bytes: Uint8Array): Promise<EncodedDrawing> {
  const format = drawingFormat(bytes);
  await checkHeader(bytes, format);
  const image = await encode(encoders[format](sharp(bytes, options)), mediaTypes[format]);
  const small = sharp(image.bytes, options).resize({
    width: thumbnailSidePx,
    height: thumbnailSidePx,
    fit: "inside",
    withoutEnlargement: true,
  });
  return { image, thumbnail: await encode(small.webp({ quality: 80 }), mediaTypes.webp) };
}
