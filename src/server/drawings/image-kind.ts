import { Refusal } from "~/domain/errors";

export type DrawingFormat = "png" | "jpeg" | "webp";

export const mediaTypes: Record<DrawingFormat, string> = {
  png: "image/png",
  jpeg: "image/jpeg",
  webp: "image/webp",
};

const refuse = (message: string, cause?: unknown) => new Refusal("drawing.refused", message, { cause });

export const unreadable = (cause?: unknown) =>
  refuse(
    "The image is damaged or was cut short, so it cannot be read to its end. Save it again from the program it came from and upload that file.",
    cause,
  );

const startsWith = (bytes: Uint8Array, text: string, at = 0): boolean =>
  [...text].every((character, index) => bytes[at + index] === character.charCodeAt(0));

/** The format that the first bytes say, whatever the file is called. Only these three ever reach a decoder. */
function signature(bytes: Uint8Array): DrawingFormat | undefined {
  if (startsWith(bytes, "\x89PNG\r\n\x1a\n")) return "png";
  if (startsWith(bytes, "\xff\xd8\xff")) return "jpeg";
  if (startsWith(bytes, "RIFF") && startsWith(bytes, "WEBP", 8)) return "webp";
  return undefined;
}

const saveAsPng = "Save it as PNG, JPEG or WebP and upload that file.";

function whatItIsInstead(bytes: Uint8Array): string {
  const beginning = new TextDecoder("latin1").decode(bytes.subarray(0, 1024));
  if (beginning.includes("%PDF-"))
    return "This is a PDF. Choose it on the sheet with “Upload a drawing”: the page that you pick there is drawn in your browser and sent as an image.";
  if (/<svg[\s>]/i.test(beginning))
    return `This is an SVG drawing, which is not taken as it is. ${saveAsPng}`;
  if (/^(II\*\0|MM\0\*)/.test(beginning)) return `This is a TIFF image. ${saveAsPng}`;
  if (/^....ftyp(hei|hev|mif1|msf1|avi)/s.test(beginning))
    return `This is a HEIF or AVIF image. ${saveAsPng}`;
  if (beginning.startsWith("GIF8")) return `This is a GIF image. ${saveAsPng}`;
  if (beginning.startsWith("BM")) return `This is a BMP image. ${saveAsPng}`;
  if (/^AC10\d\d/.test(beginning)) return `This is a DWG drawing. Plot the floor to PDF or PNG first.`;
  return `This is not an image that can be read. ${saveAsPng}`;
}

/** Judges a file by its content. @throws Refusal drawing.refused, which says what to do instead */
export function drawingFormat(bytes: Uint8Array): DrawingFormat {
  if (bytes.byteLength === 0) throw refuse("The file is empty. Choose another one.");
  const format = signature(bytes);
  if (format === undefined) throw refuse(whatItIsInstead(bytes));
  return format;
}
