import { describe, expect, it } from "vitest";
import { ServiceBusyError } from "@/services/errors";
import { Turns } from "@/services/turns";

/** Work that ends when told to, and a diary of what began. */
function works() {
  const begun: string[] = [];
  const ends = new Map<string, () => void>();
  const work = (name: string) => () => {
    begun.push(name);
    return new Promise<string>((resolve) => ends.set(name, () => resolve(name)));
  };
  return { begun, work, end: (name: string) => ends.get(name)?.() };
}

const settled = () => new Promise((resolve) => setImmediate(resolve));

describe("Turns.take(work, signal)", () => {
  it("runs as many at a time as there are places, and the others in their order", async () => {
    const { begun, work, end } = works();
    const turns = new Turns(2, 10);
    const all = ["a", "b", "c", "d"].map((name) => turns.take(work(name)));
    await settled();
    expect(begun).toEqual(["a", "b"]);
    expect(turns.waiting).toBe(2);
    end("b");
    await settled();
    expect(begun).toEqual(["a", "b", "c"]);
    for (const name of ["a", "c"]) end(name);
    await settled();
    end("d");
    expect(await Promise.all(all)).toEqual(["a", "b", "c", "d"]);
  });

  it("frees the place of work that failed", async () => {
    const turns = new Turns(1, 10);
    const failing = turns.take(() => Promise.reject(new Error("broken")));
    const next = turns.take(async () => "next");
    await expect(failing).rejects.toThrow("broken");
    expect(await next).toBe("next");
    expect(await turns.take(async () => "again")).toBe("again");
  });

  it("lets whoever gives up leave the queue, and nobody in whose signal was aborted before", async () => {
    const { begun, work, end } = works();
    const turns = new Turns(1, 10);
    const first = turns.take(work("first"));
    const controller = new AbortController();
    const leaving = turns.take(work("leaving"), controller.signal);
    const last = turns.take(work("last"));
    await settled();
    controller.abort();
    await expect(leaving).rejects.toThrow(/abort/i);
    await expect(turns.take(work("late"), controller.signal)).rejects.toThrow(/abort/i);
    end("first");
    await first;
    await settled();
    end("last");
    await last;
    expect(begun).toEqual(["first", "last"]);
  });

  it("refuses more than may wait, and sends away on demand those who do", async () => {
    const { work, end } = works();
    const turns = new Turns(1, 1);
    const first = turns.take(work("first"));
    const second = turns.take(work("second"));
    await expect(turns.take(work("third"))).rejects.toThrow(ServiceBusyError);
    const sentAway = expect(second).rejects.toThrow("closed");
    turns.dismiss(new Error("closed"));
    await sentAway;
    end("first");
    expect(await first).toBe("first");
  });
});
