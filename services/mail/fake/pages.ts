import type { ReceivedMail } from "./parse";

/** The stand-in's two pages. They are for developers, so they are plain on purpose. */

const frame = (title: string, body: string) => `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><title>${title}</title>
<meta name="viewport" content="width=device-width">
<style>body{font:16px/1.5 system-ui,sans-serif;max-width:60rem;margin:2rem auto;padding:0 1rem}
table{border-collapse:collapse;width:100%}td,th{text-align:left;padding:.4rem .8rem .4rem 0;border-bottom:1px solid #ccc}
pre{white-space:pre-wrap}iframe{width:100%;height:36rem;border:1px solid #ccc}</style></head>
<body>${body}</body></html>`;

const escape = (text: string) =>
  text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll('"', "&quot;");

/** Every message, newest first. */
export function listPage(mails: readonly ReceivedMail[]): string {
  const rows = mails
    .map(
      ({ id, receivedAt, to, subject }) =>
        `<tr><td>${escape(receivedAt.slice(0, 19).replace("T", " "))}</td><td>${escape(to.join(", "))}</td><td><a href="/messages/${escape(id)}">${escape(subject)}</a></td></tr>`,
    )
    .join("");
  const table =
    mails.length === 0
      ? "<p>No message yet.</p>"
      : `<table><tr><th>Received (UTC)</th><th>To</th><th>Subject</th></tr>${rows}</table>`;
  return frame(
    "Local mail",
    `<h1>Local mail</h1><p>Messages that this installation would have sent. None leaves this machine.</p>${table}`,
  );
}

/** One message, as text and as its receiver's mail program would draw it. */
export function messagePage(mail: ReceivedMail): string {
  return frame(
    escape(mail.subject),
    `<p><a href="/">All messages</a></p><h1>${escape(mail.subject)}</h1>
<p>To ${escape(mail.to.join(", "))}<br>From ${escape(mail.from)}<br>${escape(mail.receivedAt)}</p>
<h2>As text</h2><pre>${escape(mail.text)}</pre>
<h2>As HTML</h2><iframe sandbox title="The message" src="/messages/${escape(mail.id)}/html"></iframe>`,
  );
}
