import type { z } from "zod";
import { drawingAnswer } from "~/domain/answers/plans";
import { NoConnection, refusalOf } from "./api";

export type UploadedDrawing = z.output<typeof drawingAnswer>;

/** The person cancelled; nothing was kept. */
export class UploadCancelled extends Error {
  constructor() {
    super("The upload was cancelled.");
    this.name = "UploadCancelled";
  }
}

export interface Upload {
  done: Promise<UploadedDrawing>;
  cancel: () => void;
}

/**
 * Sends an image's bytes and tells how far it is, 0 to 1; at 1 the server is still judging them.
 * `done` fails with ApiRefusal, NoConnection or UploadCancelled.
 */
export function uploadDrawing(
  url: string,
  image: Blob,
  fileName: string,
  onProgress: (share: number) => void,
): Upload {
  const request = new XMLHttpRequest();
  const done = new Promise<UploadedDrawing>((resolve, reject) => {
    request.upload.onprogress = ({ loaded, total }) => onProgress(total > 0 ? loaded / total : 0);
    request.onload = () => {
      if (request.status < 200 || request.status > 299) {
        reject(refusalOf(request.status, request.responseText));
        return;
      }
      try {
        resolve(drawingAnswer.parse(JSON.parse(request.responseText)));
      } catch (malformed) {
        reject(new NoConnection(malformed));
      }
    };
    request.onerror = () => reject(new NoConnection());
    request.onabort = () => reject(new UploadCancelled());
    request.open("POST", url);
    request.setRequestHeader("content-type", image.type);
    request.setRequestHeader("x-file-name", encodeURIComponent(fileName));
    request.send(image);
  });
  return { done, cancel: () => request.abort() };
}
