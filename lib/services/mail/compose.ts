import "server-only";

export interface ComposedMail {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

/** A mail before it is laid out: who asks what first, then the facts, then where to look. */
export interface MailContent {
  readonly subject: string;
  /** First sentence: a name and what is asked or told. */
  readonly lead: string;
  readonly paragraphs: readonly string[];
  /** Lines that keep their columns, as lib/review/change-summary gives them. */
  readonly lines: readonly string[];
  readonly link: { readonly label: string; readonly url: string };
}

const FOOT =
  "The link only shows the change. Nothing is decided by opening it; decisions are signed at the desk.";

/** Both parts of a mail from the same words: plain text that reads well by itself, and HTML that looks like the sheet. */
export function composeMail(content: MailContent): ComposedMail {
  return { subject: content.subject, text: plainText(content), html: htmlText(content) };
}

function plainText({ lead, paragraphs, lines, link }: MailContent): string {
  const parts = [lead, ...paragraphs, lines.join("\n"), `${link.label}: ${link.url}`, FOOT];
  return `${parts.filter((part) => part !== "").join("\n\n")}\n`;
}

function htmlText({ subject, lead, paragraphs, lines, link }: MailContent): string {
  const body = [
    `<p style="font-weight:600">${escapeHtml(lead)}</p>`,
    ...paragraphs.map((words) => `<p>${escapeHtml(words)}</p>`),
    lines.length === 0 ? "" : `<pre style="${PRE}">${escapeHtml(lines.join("\n"))}</pre>`,
    `<p><a href="${escapeHtml(link.url)}" style="color:#1D4F7C">${escapeHtml(link.label)}</a></p>`,
    `<p style="color:#566066;font-size:13px">${FOOT}</p>`,
  ].join("\n");
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;background:#EFEDE6;color:#1C2326;font:15px/1.5 Archivo,Arial,sans-serif">
<div style="max-width:640px;margin:24px auto;padding:24px;background:#FBFAF6;border:1px solid #1C2326">
${body}
</div></body></html>
`;
}

const PRE =
  "font:13px/1.5 ui-monospace,Menlo,Consolas,monospace;white-space:pre-wrap;border-top:1px solid #CCC8BB;border-bottom:1px solid #CCC8BB;padding:12px 0";

export function escapeHtml(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;")
    .replaceAll("'", "&#39;");
}
