/** Changes whenever a figure or text of a result can change for the same document. */
export const ENGINE_VERSION = "1.1.0";
