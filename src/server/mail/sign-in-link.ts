import { escapeHtml, mailDocument } from "./html";
import { wrapped } from "./plain-text";

interface SignInLink {
  name: string;
  /** Of the page that asks for one more click; opening it changes nothing. */
  url: string;
  minutes: number;
}

const paragraph = "margin:0 0 12px;";

/** The mail that carries a one-time link. */
export function signInLinkMail({ name, url, minutes }: SignInLink): {
  subject: string;
  text: string;
  html: string;
} {
  const greeting = `Hello ${name},`;
  const lead = `this link signs you in to Stillneedle. It works once and for ${String(minutes)} minutes.`;
  const rest = "If you did not ask for it, ignore this message: without the link nobody gets in.";
  return {
    subject: "Your link to sign in to Stillneedle",
    text: `${greeting}\n\n${wrapped(lead)}\n\n${url}\n\n${wrapped(rest)}\n`,
    html: mailDocument(
      "Sign in to Stillneedle",
      `<p style="${paragraph}">${escapeHtml(greeting)}</p>
<p style="${paragraph}">${escapeHtml(lead)}</p>
<p style="${paragraph}"><a href="${escapeHtml(url)}" style="display:inline-block;padding:12px 18px;background-color:#1e6f66;color:#ffffff;font-weight:600;text-decoration:none;">Sign in</a></p>
<p style="${paragraph}font-size:14px;line-height:20px;overflow-wrap:anywhere;word-break:break-all;">${escapeHtml(url)}</p>
<p style="${paragraph}">${escapeHtml(rest)}</p>`,
    ),
  };
}
