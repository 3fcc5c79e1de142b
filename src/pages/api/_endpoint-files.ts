/**
 * Every endpoint file by its path from here, loaded when it is first asked for. A file of its own, since a glob leaves out
 * the file that it stands in and the description describes itself too.
 */
export const endpointFiles = import.meta.glob<Record<string, unknown>>(["./**/*.ts", "!**/_*"]);
