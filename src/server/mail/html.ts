/** Text made safe for HTML, in attributes too. */
export const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (character) => `&#${String(character.charCodeAt(0))};`);

/** Plain text of a person as paragraphs: an empty line ends one, a line end is kept. */
export const paragraphs = (text: string, style: string): string =>
  text
    .split(/\n{2,}/)
    .filter((block) => block.trim() !== "")
    .map((block) => `<p style="${style}">${escapeHtml(block).replaceAll("\n", "<br>")}</p>`)
    .join("");

/**
 * A mail as mail programs show it everywhere: tables, styles in the tags, nothing fetched. Paper and ink are both
 * stated, so that a program that turns colours round for its dark mode turns both.
 */
export const mailDocument = (title: string, body: string): string => `<!doctype html>
<html lang="en-GB">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<meta name="supported-color-schemes" content="light dark">
<title>${escapeHtml(title)}</title>
</head>
<body style="margin:0;padding:0;background-color:#f6f7f2;color:#17242b;">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" border="0" style="background-color:#f6f7f2;">
<tr><td align="center" style="padding:16px 12px;">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" border="0" style="max-width:640px;">
<tr><td style="font-family:'Source Sans 3','Segoe UI',Helvetica,Arial,sans-serif;font-size:16px;line-height:24px;color:#17242b;text-align:left;">
${body}
</td></tr>
</table>
</td></tr>
</table>
</body>
</html>
`;
