import { parse } from "csv-parse/sync";
import { describe, expect, it } from "vitest";
import { csvStream, type CsvFile } from "@/services/exports/csv";

async function textOf(file: Partial<CsvFile>): Promise<string> {
  const bytes = await new Response(
    csvStream({ names: ["name", "value"], rows: [], byteOrderMark: false, ...file }),
  ).arrayBuffer();
  return new TextDecoder("utf-8", { ignoreBOM: true }).decode(bytes);
}

describe("csvStream(file)", () => {
  it("ends every record with CRLF and quotes only where it must (RFC 4180)", async () => {
    const rows = [
      ["plain", 1],
      ['says "yes"', 2],
      ["a, b", 3],
      ["two\nlines", 4],
    ];
    expect(await textOf({ rows })).toBe(
      'name,value\r\nplain,1\r\n"says ""yes""",2\r\n"a, b",3\r\n"two\nlines",4\r\n',
    );
  });

  it("has a header row even without rows", async () => {
    expect(await textOf({})).toBe("name,value\r\n");
  });

  it("writes numbers with all their digits and a point, and nothing for what is missing", async () => {
    const rows = [
      ["third", 1 / 3],
      ["large", 1234567.125],
      ["none", null],
    ];
    expect(await textOf({ rows })).toContain(
      "third,0.3333333333333333\r\nlarge,1234567.125\r\nnone,\r\n",
    );
  });

  // The characters of OWASP's page on CSV injection, and their full-width forms.
  it.each(["=1+1", "+1", "-1", "@SUM(A1)", "\t=1", "\r=1", "＝1", "＋1", "－1", "＠1"])(
    "puts an apostrophe before the text %j, so that no spreadsheet runs it",
    async (text) => {
      const [row] = parse(await textOf({ rows: [[text, 0]] }), { columns: true }) as {
        name: string;
      }[];
      expect(row.name).toBe(`'${text}`);
    },
  );

  it("leaves a negative number a number", async () => {
    expect(await textOf({ rows: [["loss", -5.25]] })).toContain("loss,-5.25\r\n");
  });

  it("begins with a byte-order mark only when asked", async () => {
    expect((await textOf({ byteOrderMark: true })).charCodeAt(0)).toBe(0xfeff);
    expect((await textOf({})).charCodeAt(0)).not.toBe(0xfeff);
  });

  it("does not hold all rows at a time", async () => {
    let given = 0;
    function* rows() {
      for (; given < 100_000; given += 1) yield ["row", given];
    }
    const reader = csvStream({
      names: ["name", "value"],
      rows: { [Symbol.iterator]: rows },
      byteOrderMark: false,
    }).getReader();
    await reader.read();
    await reader.cancel();
    expect(given).toBeLessThan(50_000);
  });
});
