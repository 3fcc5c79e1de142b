/** Control characters, line and paragraph separators, and the marks that turn the direction of writing round. */
const unruly = /[\p{Cc}\u2028\u2029\u200e\u200f\u202a-\u202e\u2066-\u2069]+/gu;

/** `text` as one line that can stand in a header, a heading or a list without changing what is around it. */
export const oneLine = (text: string): string => text.replace(unruly, " ").trim();
