import { fileURLToPath } from "node:url";

/** The folder that holds package.json. */
export const repositoryFolder = fileURLToPath(new URL("../..", import.meta.url));

export const inRepository = (path: string): string =>
  fileURLToPath(new URL(`../../${path}`, import.meta.url));
