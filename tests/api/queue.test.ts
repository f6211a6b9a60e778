import { afterAll, describe, expect, it } from "vitest";
import { sequelize } from "@/models/sequelize";
import { sendLetter } from "@/services/mail/send";
import { closeQueue, enqueue } from "@/services/queue/queue";
import { queryRows } from "../support/database";
import { mailTo } from "../support/mail";

const letter = (subject: string) => ({
  subject,
  greeting: "Marit Sundeholt",
  paragraphs: ["The round is open."],
});

async function waitingJobs(subject: string): Promise<number> {
  const [{ jobs }] = await queryRows<{ jobs: string }>(
    "select count(*) as jobs from pgboss.job where data->>'subject' = $1",
    [subject],
  );
  return Number(jobs);
}

afterAll(async () => {
  await closeQueue();
  await sequelize.close();
});

describe("sendLetter", () => {
  it("is done by the worker, through the mail relay", async () => {
    await sendLetter("marit.sundeholt@quillmere.example", letter("The round is open"));
    const mail = await mailTo("marit.sundeholt@quillmere.example", "The round is open");
    expect(mail.text).toContain("Dear Marit Sundeholt,");
  });

  it("sends nothing when the change it reports is rolled back", async () => {
    const failed = sequelize.transaction(async (transaction) => {
      await sendLetter("marit.sundeholt@quillmere.example", letter("Never sent"), { transaction });
      throw new Error("the change was refused");
    });
    await expect(failed).rejects.toThrow("the change was refused");
    expect(await waitingJobs("Never sent")).toBe(0);
  });

  it("is kept when the change it reports is kept", async () => {
    await sequelize.transaction((transaction) =>
      sendLetter("marit.sundeholt@quillmere.example", letter("Kept"), { transaction }),
    );
    await mailTo("marit.sundeholt@quillmere.example", "Kept");
  });
});

describe("enqueue", () => {
  it("refuses a payload that is not the job's", async () => {
    const wrong = { to: "nobody", subject: "x", text: "x", html: "x" };
    await expect(enqueue("send-mail", wrong)).rejects.toThrow(/email/i);
  });

  it("leaves a delayed job waiting", async () => {
    const message = {
      to: "ruth.calderwyn@quillmere.example",
      subject: "Later",
      text: "x",
      html: "<p>x</p>",
    };
    await enqueue("send-mail", message, { delaySeconds: 600 });
    expect(await waitingJobs("Later")).toBe(1);
  });
});
