/** One message as the stand-in keeps it. */
export interface ReceivedMail {
  id: string;
  receivedAt: string;
  to: string[];
  from: string;
  subject: string;
  messageId: string;
  text: string;
  html: string;
}

/**
 * Read what our own transport writes: a message with a plain-text and an HTML part, each 7-bit,
 * quoted-printable or base64. It is no general MIME reader.
 *
 * @param source the whole message as it came over SMTP
 * @param to the receivers named in the envelope
 */
export function readMail(source: string, to: string[]): Omit<ReceivedMail, "id" | "receivedAt"> {
  const { headers, body } = split(source);
  const bodies = new Map<string, string>();
  collect(headers, body, bodies);
  return {
    to,
    from: decodeWords(headers.get("from") ?? ""),
    subject: decodeWords(headers.get("subject") ?? ""),
    messageId: headers.get("message-id") ?? "",
    text: bodies.get("text/plain") ?? "",
    html: bodies.get("text/html") ?? "",
  };
}

function split(source: string): { headers: Map<string, string>; body: string } {
  const [, head, body] = /^([\s\S]*?)\r?\n\r?\n([\s\S]*)$/.exec(source) ?? ["", source, ""];
  const headers = new Map<string, string>();
  for (const line of head.replaceAll(/\r?\n[ \t]+/g, " ").split(/\r?\n/)) {
    const colon = line.indexOf(":");
    if (colon > 0) headers.set(line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim());
  }
  return { headers, body };
}

function collect(headers: Map<string, string>, body: string, bodies: Map<string, string>): void {
  const type = headers.get("content-type") ?? "text/plain";
  const boundary = /boundary="?([^";]+)"?/i.exec(type)?.[1];
  if (boundary === undefined) {
    const kind = type.split(";")[0].trim().toLowerCase();
    bodies.set(kind, decodeBody(body, headers.get("content-transfer-encoding") ?? "7bit"));
    return;
  }
  for (const part of body.split(`--${boundary}`).slice(1, -1)) {
    const inner = split(part.replace(/^\r?\n/, ""));
    collect(inner.headers, inner.body, bodies);
  }
}

function decodeBody(body: string, encoding: string): string {
  switch (encoding.toLowerCase()) {
    case "base64":
      return Buffer.from(body, "base64").toString("utf8");
    case "quoted-printable":
      return decodeQuoted(body.replaceAll(/=\r?\n/g, ""));
    default:
      return body;
  }
}

function decodeQuoted(text: string): string {
  const bytes: number[] = [];
  for (let at = 0; at < text.length; at += 1) {
    const code = text[at] === "=" ? Number.parseInt(text.slice(at + 1, at + 3), 16) : Number.NaN;
    if (Number.isNaN(code)) {
      bytes.push(...Buffer.from(text[at], "utf8"));
    } else {
      bytes.push(code);
      at += 2;
    }
  }
  return Buffer.from(bytes).toString("utf8");
}

/** Words such as =?UTF-8?Q?caf=C3=A9?= in a header (RFC 2047). */
function decodeWords(text: string): string {
  return text
    .replaceAll(/\?=\s+=\?/g, "?==?")
    .replaceAll(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_whole, how: string, word: string) =>
      how.toLowerCase() === "b"
        ? Buffer.from(word, "base64").toString("utf8")
        : decodeQuoted(word.replaceAll("_", " ")),
    );
}
