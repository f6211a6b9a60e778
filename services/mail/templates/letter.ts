/**
 * The one layout of our e-mails: a greeting, a few short paragraphs, at most one button. It is
 * rendered as plain text and as HTML from the same words, so the two never differ.
 */
export interface Letter {
  subject: string;
  /** The name of the person who receives it. */
  greeting: string;
  paragraphs: readonly string[];
  /** What to do next, and where. */
  action?: { label: string; url: string };
}

/** The subject and both bodies of a letter. */
export function renderLetter(letter: Letter): { subject: string; text: string; html: string } {
  return { subject: letter.subject, text: plainText(letter), html: html(letter) };
}

const SIGNATURE = "Dewledger, the shared book of your gas-condensate fields";

function plainText({ greeting, paragraphs, action }: Letter): string {
  const parts = [`Dear ${greeting},`, ...paragraphs];
  if (action !== undefined) parts.push(`${action.label}:\n${action.url}`);
  return `${parts.join("\n\n")}\n\n-- \n${SIGNATURE}\n`;
}

/** Mail programs ignore style sheets and variables, so this is the one place with raw colours. */
function html({ subject, greeting, paragraphs, action }: Letter): string {
  const button =
    action === undefined
      ? ""
      : `<p style="margin:24px 0"><a href="${escapeHtml(action.url)}" style="background:#0E4A48;color:#FFFFFF;padding:10px 18px;border-radius:3px;text-decoration:none;font-weight:600">${escapeHtml(action.label)}</a></p>
<p style="font-size:13px;color:#55605A">Or open this address: ${escapeHtml(action.url)}</p>`;
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;background:#FAF8F2;color:#1C2421;font:16px/1.5 'Source Sans 3',Arial,sans-serif">
<div style="max-width:560px;margin:0 auto;padding:32px 24px">
<p style="font:600 20px/1.2 'Source Serif 4',Georgia,serif;border-bottom:1px solid #DDD8CA;padding-bottom:12px">Dewledger</p>
<p>Dear ${escapeHtml(greeting)},</p>
${paragraphs.map((paragraph) => `<p>${escapeHtml(paragraph)}</p>`).join("\n")}
${button}
<p style="border-top:1px solid #DDD8CA;padding-top:12px;font-size:13px;color:#55605A">${SIGNATURE}</p>
</div></body></html>
`;
}

function escapeHtml(text: string): string {
  const entities: Record<string, string> = {
    "&": "&amp;",
    "<": "&lt;",
    ">": "&gt;",
    '"': "&quot;",
    "'": "&#39;",
  };
  return text.replace(/[&<>"']/g, (character) => entities[character]);
}
