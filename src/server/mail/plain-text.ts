const columns = 76;

/** Breaks `text` at spaces into lines of at most 76 columns; a longer word, such as an address, stays whole. */
export function wrapped(text: string, firstIndent = "", indent = firstIndent.replace(/\S/g, " ")): string {
  const lines: string[] = [];
  let line = firstIndent;
  let isEmpty = true;
  for (const word of text.split(/ +/)) {
    const longer = isEmpty ? line + word : `${line} ${word}`;
    if (!isEmpty && [...longer].length > columns) {
      lines.push(line);
      line = indent + word;
    } else line = longer;
    isEmpty = false;
  }
  lines.push(line);
  return lines.join("\n");
}
