import net from "node:net";
import { describe, expect, it } from "vitest";
import { anyFreePort, choosePort, isPortFree, portTakenFailure } from "@/scripts/lib/ports.mjs";
import { portsApart } from "@/scripts/lib/remembered-ports.mjs";

const range = { first: 5460, count: 10, key: "/home/ines/dewledger" };

describe("choosePort", () => {
  it("keeps the remembered port while it is free", async () => {
    const port = await choosePort({ ...range, remembered: 6123, isFree: async () => true });
    expect(port).toBe(6123);
  });

  it("takes another port of the range when the remembered one is used", async () => {
    const isFree = async (port: number) => port !== 5463;
    const port = await choosePort({ ...range, remembered: 5463, isFree });
    expect(port).not.toBe(5463);
    expect(port).toBeGreaterThanOrEqual(5460);
    expect(port).toBeLessThan(5470);
  });

  it("starts two clones at different places", async () => {
    const isFree = async () => true;
    const many = { ...range, count: 200, remembered: null, isFree };
    const first = await choosePort({ ...many, key: "/home/ines/dewledger" });
    const second = await choosePort({ ...many, key: "/home/marit/dewledger" });
    expect(first).not.toBe(second);
  });

  it("finds the only free port of the range", async () => {
    const isFree = async (port: number) => port === 5462;
    expect(await choosePort({ ...range, remembered: null, isFree })).toBe(5462);
  });

  it("says which range is full", async () => {
    const full = choosePort({ ...range, remembered: null, isFree: async () => false });
    await expect(full).rejects.toThrow("No free port between 5460 and 5469");
  });
});

describe("portsApart", () => {
  const names = ["smtp", "mailPage", "storage"];
  const isFree = async () => true;

  it("gives every stand-in a port of its own, whatever the folder's path", async () => {
    for (let clone = 0; clone < 500; clone += 1) {
      const ports = await portsApart(names, { kept: {}, key: `/home/ines/${clone}`, isFree });
      expect(new Set(Object.values(ports)).size).toBe(names.length);
    }
  });

  it("parts two stand-ins that remember the same port", async () => {
    const kept = { smtp: 5731, mailPage: 5787, storage: 5787 };
    const ports = await portsApart(names, { kept, key: "/home/ines", isFree });
    expect(ports.mailPage).toBe(5787);
    expect(ports.storage).not.toBe(5787);
  });
});

describe("isPortFree", () => {
  it("tells a used port from a free one", async () => {
    const server = net.createServer();
    await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
    const { port } = server.address() as net.AddressInfo;
    expect(await isPortFree(port)).toBe(false);
    await new Promise((resolve) => server.close(resolve));
    expect(await isPortFree(port)).toBe(true);
  });

  it("agrees with anyFreePort", async () => {
    expect(await isPortFree(await anyFreePort())).toBe(true);
  });
});

describe("portTakenFailure", () => {
  it("names the port and shows how to choose another", () => {
    const failure = portTakenFailure(3000, "npm run dev");
    expect(failure.message).toBe("Port 3000 is used by another program.");
    expect(failure.remedy).toContain("PORT=3001 npm run dev");
  });
});
