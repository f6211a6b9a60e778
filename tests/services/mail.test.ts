import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import type { ReceivedMail } from "@/services/mail/fake/parse";
import { startMailFake } from "@/services/mail/fake/server";
import { mailMessage } from "@/services/mail/message";
import { estimateDecidedLetter } from "@/services/mail/templates/estimate-letters";
import { renderLetter } from "@/services/mail/templates/letter";
import { deliver } from "@/services/mail/transport";

describe("renderLetter", () => {
  const letter = {
    subject: "For review: Heron Deep",
    greeting: "Tobias Falkmere",
    paragraphs: ["Ines <ines@quillmere.example> wrote: area > 2,000 acres & rising."],
    action: { label: "Review it", url: "http://127.0.0.1:3000/reviews/1?a=1&b=2" },
  };

  it("says the same in text and in HTML", () => {
    const { text, html } = renderLetter(letter);
    expect(text).toContain("area > 2,000 acres & rising.");
    expect(html).toContain("area &gt; 2,000 acres &amp; rising.");
  });

  it("lets no markup of a person's words into the HTML", () => {
    const { html } = renderLetter(letter);
    expect(html).not.toContain("<ines@");
    expect(html).toContain('href="http://127.0.0.1:3000/reviews/1?a=1&amp;b=2"');
  });
});

describe("mailMessage", () => {
  it("refuses a subject that would add a header", () => {
    const message = { to: "a@b.example", subject: "x\r\nBcc: c@d.example", text: "x", html: "x" };
    expect(mailMessage.safeParse(message).success).toBe(false);
  });
});

describe("deliver", () => {
  let folder: string;
  let page: string;
  let stop: () => Promise<void>;

  beforeAll(async () => {
    folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-mail-"));
    const { smtpPort, httpPort, close } = await startMailFake(folder, { smtp: 0, http: 0 });
    stop = close;
    page = `http://127.0.0.1:${httpPort}`;
    vi.stubEnv("DATABASE_URL", "postgresql://127.0.0.1/none");
    vi.stubEnv("NEXTAUTH_URL", "http://127.0.0.1:3000");
    vi.stubEnv("NEXTAUTH_SECRET", "0123456789abcdef0123456789abcdef");
    vi.stubEnv("SMTP_URL", `smtp://127.0.0.1:${smtpPort}`);
    vi.stubEnv("S3_ENDPOINT", "http://127.0.0.1:9");
    vi.stubEnv("S3_ACCESS_KEY_ID", "local");
    vi.stubEnv("S3_SECRET_ACCESS_KEY", "secret");
  });

  afterAll(async () => {
    vi.unstubAllEnvs();
    await stop();
    fs.rmSync(folder, { recursive: true });
  });

  it("brings a letter to the relay whole, accents and long lines included", async () => {
    const note = `Größe geprüft – ${"the contact is 40 ft deeper than in the log; ".repeat(12)}`;
    const letter = estimateDecidedLetter("Ines Okonrae", "Tobias Falkmere", "returned", note, {
      reservoirName: "Heron Déep",
      fieldName: "Heron",
      revision: 3,
      url: "http://127.0.0.1:3000/fields/heron/deep",
    });
    const rendered = renderLetter(letter);
    await deliver({ to: "ines.okonrae@quillmere.example", ...rendered }, { id: "job-1" });

    const answer = await fetch(`${page}/messages.json`);
    const [mail] = (await answer.json()) as ReceivedMail[];
    expect(mail).toMatchObject({
      to: ["ines.okonrae@quillmere.example"],
      subject: "Returned: Heron Déep, revision 3",
      messageId: "<job-1@dewledger>",
    });
    expect(mail.text.replaceAll("\r\n", "\n").trim()).toBe(rendered.text.trim());
    expect(mail.html.replaceAll("\r\n", "\n").trim()).toBe(rendered.html.trim());
  });

  it("is shown on the stand-in's pages", async () => {
    const list = await (await fetch(page)).text();
    expect(list).toContain("Returned: Heron Déep, revision 3");
    const link = /href="(\/messages\/[^"]+)"/.exec(list)?.[1];
    const message = await (await fetch(`${page}${link}`)).text();
    expect(message).toContain("Größe geprüft");
  });
});
