import { type Role, roleDescriptions } from "~/domain/roles";
import { escapeHtml, mailDocument } from "./html";
import { wrapped } from "./plain-text";

interface Invitation {
  name: string;
  inviterName: string;
  organisationName: string;
  roles: readonly Role[];
  /** Of the page that asks for one more click; opening it changes nothing. */
  url: string;
  days: number;
}

const paragraph = "margin:0 0 12px;";

/** The mail that asks somebody to become a member. */
export function invitationMail(invitation: Invitation): { subject: string; text: string; html: string } {
  const { name, inviterName, organisationName, roles, url, days } = invitation;
  const greeting = `Hello ${name},`;
  const lead = `${inviterName} invites you to ${organisationName} on Stillneedle, where sensors near power cabling are screened for magnetic interference. You would be:`;
  const list = roles.map((role) => `${role}: ${roleDescriptions[role]}`);
  const rest = `The link works once and for ${String(days)} days. Opening it changes nothing yet; a button on its page accepts. If you did not expect this, ignore it.`;
  return {
    subject: `Invitation to ${organisationName} on Stillneedle`,
    text: `${greeting}\n\n${wrapped(lead)}\n\n${list.map((line) => wrapped(line, "- ")).join("\n")}\n\n${url}\n\n${wrapped(rest)}\n`,
    html: mailDocument(
      `Invitation to ${organisationName}`,
      `<p style="${paragraph}">${escapeHtml(greeting)}</p>
<p style="${paragraph}">${escapeHtml(lead)}</p>
<ul style="margin:0 0 12px;padding-left:20px;">${list.map((line) => `<li>${escapeHtml(line)}</li>`).join("")}</ul>
<p style="${paragraph}"><a href="${escapeHtml(url)}" style="display:inline-block;padding:12px 18px;background-color:#1e6f66;color:#ffffff;font-weight:600;text-decoration:none;">See the invitation</a></p>
<p style="${paragraph}font-size:14px;line-height:20px;overflow-wrap:anywhere;word-break:break-all;">${escapeHtml(url)}</p>
<p style="${paragraph}">${escapeHtml(rest)}</p>`,
    ),
  };
}
