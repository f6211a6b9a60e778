import { describe, expect, it } from "vitest";
import { labSheetResponseSchema } from "@/app/api/v1/calculations/fluid-schema";
import { LONGEST_LAB_SHEET } from "@/app/api/v1/calculations/fluid-schema";
import { readLabSheet } from "@/services/lab-sheets/read-lab-sheet";
import { labSheetTemplate } from "@/services/lab-sheets/template";

const sheet = (...lines: string[]) => readLabSheet(lines.join("\n"));

/** A heptanes-plus sheet with its plus line and properties, to put other lines into. */
const wellstream = (...lines: string[]) =>
  sheet(
    "composition",
    "component,mol %",
    ...lines,
    "C7+,5",
    "molecular weight of C7+,150",
    "specific gravity of C7+,0.79",
  );

function streamOf({ composition }: ReturnType<typeof readLabSheet>) {
  if (composition?.kind !== "wellstream") throw new Error("there is no wellstream");
  return composition.stream;
}

function rowsOf({ depletion }: ReturnType<typeof readLabSheet>) {
  if (!depletion) throw new Error("there is no depletion table");
  return depletion.rows;
}

describe("labSheetTemplate", () => {
  it("is read whole, without a problem", () => {
    const read = readLabSheet(labSheetTemplate());
    labSheetResponseSchema.parse(read);
    expect(read.problems).toEqual([]);
    expect(streamOf(read).plus).toMatchObject({ carbonNumber: 7, molePercent: 5.45 });
    expect(rowsOf(read)).toHaveLength(8);
    expect(read.stages).toHaveLength(2);
    expect(read.separatorTest).toMatchObject({ condensateApi: 52.7 });
    expect(read.separatorTest?.nitrogen).toBeCloseTo(0.011, 12);
  });
});

describe("readLabSheet: compositions", () => {
  it("knows the components by the names laboratories use", () => {
    const { light } = streamOf(
      wellstream(
        ...["Hydrogen Sulphide,1", "carbon dioxide,2", "Nitrogen,3", "Methane,60", "ethane,10"],
        ...["Propane,8", "iso-Butane,1", "n-Butane,2", "i-Pentane,3", "N PENTANE,2", "Hexanes,3"],
      ),
    );
    expect(light).toEqual({
      ...{ H2S: 1, CO2: 2, N2: 3, C1: 60, C2: 10, C3: 8 },
      ...{ iC4: 1, nC4: 2, iC5: 3, nC5: 2, C6: 3 },
    });
  });

  it("reads mole fractions by their unit, and by their sum when there is none", () => {
    const withUnit = sheet("composition", "component,mole fraction", "C1,0.9", "C2,0.1");
    const without = sheet("composition", "component,wellstream", "C1,0.9", "C2,0.1");
    expect(streamOf(withUnit).light).toEqual({ C1: 90, C2: 10 });
    expect(streamOf(without).light).toEqual({ C1: 90, C2: 10 });
    expect(without.read.join(" ")).toContain("read as mole fractions");
  });

  it("says so when a sum is neither that of per cent nor that of fractions", () => {
    const read = sheet("composition", "component,wellstream", "C1,30", "C2,10");
    expect(read.problems).toEqual([
      expect.objectContaining({ line: 3, message: expect.stringContaining("neither 1 nor 100") }),
    ]);
  });

  it("takes single carbon numbers up to the plus fraction, with its properties in columns", () => {
    const stream = streamOf(
      sheet(
        "composition",
        "component\tmol %\tMW\tSpecific gravity",
        "Methane\t80\t\t",
        "Heptanes\t8\t96\t0.73",
        "C8\t7\t\t",
        "Nonanes plus\t5\t170\t0.81",
      ),
    );
    expect(stream.carbonNumbers).toEqual([
      { carbonNumber: 7, molePercent: 8 },
      { carbonNumber: 8, molePercent: 7 },
    ]);
    expect(stream.plus).toEqual({
      carbonNumber: 9,
      molePercent: 5,
      molecularWeight: 170,
      specificGravity: 0.81,
    });
  });

  it("reads separator gas and liquid with what recombines them", () => {
    const read = sheet(
      "separator streams",
      "component,gas [mol %],liquid [mol %]",
      "C1,88,12",
      "C2,12,18",
      "C7+,,70",
      "molecular weight of C7+,,155",
      "specific gravity of C7+,,0.79",
      "gas-liquid ratio [Mscf/STB],9.5",
      "liquid density [g/cm3],0.7",
      "base pressure [psia],14.65",
    );
    expect(read.composition).toMatchObject({
      kind: "separatorStreams",
      gas: { light: { C1: 88, C2: 12 }, plus: null },
      liquid: { light: { C1: 12, C2: 18 }, plus: { molePercent: 70, molecularWeight: 155 } },
      gasLiquidRatioScfPerSeparatorBarrel: 9500,
      basePressurePsia: 14.65,
    });
    if (read.composition?.kind !== "separatorStreams") throw new Error("no streams");
    // 1 g/cm3 is 62.428 lb/ft3 (international foot and pound).
    expect(read.composition.liquidDensityLbPerCubicFoot).toBeCloseTo(0.7 * 62.428, 3);
    expect(read.problems).toEqual([]);
  });

  it("refuses to guess a butane, and says which line", () => {
    const read = wellstream("C1,90", "Butanes,5");
    expect(streamOf(read).light).toEqual({ C1: 90 });
    expect(read.problems).toEqual([
      expect.objectContaining({
        line: 4,
        column: 2,
        message: expect.stringMatching(/which butane.*Left out/),
      }),
    ]);
  });

  it("keeps the first of two figures for one component", () => {
    const read = wellstream("C1,90", "methane,80");
    expect(streamOf(read).light.C1).toBe(90);
    expect(read.problems[0]).toMatchObject({ line: 4, value: "80" });
  });

  it("reads no plus fraction without its weight and gravity", () => {
    const read = sheet("composition", "component,mol %", "C1,95", "C7+,5");
    expect(read.composition).toBeNull();
    expect(read.problems[0].message).toMatch(/needs a molecular weight and a specific gravity/);
  });

  it("compares a printed total with what was read", () => {
    const read = sheet("composition", "component,mol %", "C1,90", "C2,8", "Total,100");
    expect(read.problems[0]).toMatchObject({ line: 5, value: "100" });
    expect(read.problems[0].message).toContain("adds up to 98 %");
  });
});

describe("readLabSheet: depletion tables", () => {
  const study = ["depletion", "temperature [degF],280", "dew point [psig],5000"];

  it("reads pressures down the rows, with units in the header or in a row below it", () => {
    const header = sheet(
      ...study,
      "pressure [psig],liquid [%],cumulative produced [mol %],gas z,two-phase z,viscosity [cP]",
      "5000,0,0,1.1,1.1,0.04",
      "3000,12.5,20.1,0.95,0.9,0.03",
    );
    const row = sheet(
      ...study,
      "pressure,liquid,cumulative produced,gas z,two-phase z,viscosity",
      "psig,%,mol %,,,cP",
      "5000,0,0,1.1,1.1,0.04",
      "3000,12.5,20.1,0.95,0.9,0.03",
    );
    expect(row.depletion).toEqual(header.depletion);
    expect(header.depletion?.dewPointPsia).toBeCloseTo(5014.696, 9);
    const [, second] = rowsOf(header);
    expect(second).toEqual({
      pressurePsia: 3014.696,
      liquidPercent: 12.5,
      cumulativeProducedMolePercent: 20.1,
      gasZ: 0.95,
      twoPhaseZ: 0.9,
      viscosityCp: 0.03,
      producedGas: null,
    });
    expect(header.read.join(" ")).toContain("14.696");
    expect(header.problems).toEqual([]);
  });

  it("reads pressures across the columns and joins tables of one study at their pressures", () => {
    const read = sheet(
      "constant volume depletion",
      "Reservoir temperature\t138\tdegC",
      "Dew-point pressure\t34.5\tMPa",
      "Pressure, MPa\t34.5\t20\t10",
      "Retrograde liquid, %\t0\t14\t12",
      "Deviation factor\t1.05\t0.9\t0.92",
      "",
      "Composition of produced gas",
      "Pressure, MPa\t34.5\t20\t10",
      "Methane, mol %\t92\t94\t95",
      "Ethane, mol %\t8\t6\t5",
    );
    expect(read.problems).toEqual([]);
    expect(read.depletion?.temperatureDegF).toBeCloseTo(280.4, 9);
    const rows = rowsOf(read);
    expect(rows.map(({ liquidPercent }) => liquidPercent)).toEqual([0, 14, 12]);
    expect(rows.map(({ gasZ }) => gasZ)).toEqual([1.05, 0.9, 0.92]);
    expect(rows.map(({ producedGas }) => producedGas?.light.C1)).toEqual([92, 94, 95]);
    // 1 MPa is 145.0377 psi.
    expect(rows[1].pressurePsia).toBeCloseTo(2900.755, 2);
  });

  it("borrows the weight of the plus fraction from the wellstream, and says so", () => {
    const read = sheet(
      ...["composition", "component,mol %", "C1,95", "C7+,5", "MW of C7+,150", "SG of C7+,0.79"],
      ...study,
      "pressure [psia],C1 [mol %],C7+ [mol %]",
      "5014,95,5",
      "3000,97,3",
    );
    expect(rowsOf(read)[1].producedGas?.plus).toMatchObject({
      molePercent: 3,
      molecularWeight: 150,
    });
    expect(read.problems).toEqual([
      expect.objectContaining({ message: expect.stringContaining("the wellstream's were taken") }),
    ]);
  });

  it("names every cell that it could not read, and reads the rest", () => {
    const read = sheet(
      ...study,
      "pressure [psia],liquid [%],gas z",
      "5014,0,1.1",
      "4000,=A1+2,0.98",
      '3000,"12,5",#REF!',
      "x,14,0.9",
      "1000,-,0.93",
    );
    expect(rowsOf(read).map(({ liquidPercent, gasZ }) => [liquidPercent, gasZ])).toEqual([
      [0, 1.1],
      [null, 0.98],
      [null, null],
      [null, 0.93],
    ]);
    expect(read.problems.map(({ line, column, value }) => [line, column, value])).toEqual([
      [6, 2, "=A1+2"],
      [7, 2, "12,5"],
      [7, 3, "#REF!"],
      [8, 1, "x"],
    ]);
    expect(read.problems[0].message).toMatch(/formula.*Left empty/);
    expect(read.problems[3].message).toMatch(/row was left out/);
  });

  it("says which unit it assumed where none stands", () => {
    const read = sheet(
      ...["depletion", "temperature [degF],280", "dew point [psia],5000"],
      ...["pressure,liquid [%]", "5000,0", "3000,10"],
    );
    expect(read.problems).toEqual([
      expect.objectContaining({
        line: 4,
        column: 1,
        message: "No unit stands with it. The pressure was read in psia.",
      }),
    ]);
  });

  it("keeps rows in the order of the sheet, for the checks to judge", () => {
    const read = sheet(...study, "pressure [psia],gas z", "1000,0.9", "5014,1.1");
    expect(rowsOf(read).map(({ pressurePsia }) => pressurePsia)).toEqual([1000, 5014]);
  });

  it("takes the first pressure for the dew point where no line gives one, and says so", () => {
    const read = sheet(
      ...["depletion", "temperature [degF],280", "pressure [psia],gas z", "5014,1.1", "1000,0.9"],
    );
    expect(read.depletion?.dewPointPsia).toBe(5014);
    expect(read.problems[0].message).toContain("taken for it");
  });

  it("keeps up to forty pressures", () => {
    const rows = Array.from({ length: 45 }, (_, index) => `${5000 - index * 100},0.9`);
    const read = sheet(...study, "pressure [psia],gas z", ...rows);
    expect(rowsOf(read)).toHaveLength(40);
    expect(read.problems).toHaveLength(5);
  });
});

describe("readLabSheet: what cannot be", () => {
  it.each([
    ["700", "5000", "between 60 and 500 °F"],
    ["250", "500000", "at most 25000 psia"],
  ])("refuses a table at %s degF from %s psia, in words", (temperature, pressure, words) => {
    const read = sheet(
      "depletion",
      `temperature [degF],${temperature}`,
      `dew point [psia],${pressure}`,
      "pressure [psia],liquid [%]",
      `${pressure},0`,
      "4000,5",
    );
    expect(read.depletion).toBeNull();
    expect(read.problems.map(({ message }) => message).join()).toContain(words);
  });
});

describe("readLabSheet: separators", () => {
  it("reads stages alone", () => {
    const read = sheet(
      "separators",
      "pressure [barg],temperature [degC]",
      "50,40",
      "10,30",
      "0,15.5",
    );
    expect(read.stages).toHaveLength(3);
    // 50 barg is 725.189 psi above an atmosphere of 14.696.
    expect(read.stages?.[0].pressurePsia).toBeCloseTo(739.885, 3);
    expect(read.stages?.[0].temperatureDegF).toBeCloseTo(104, 9);
    expect(read.separatorTest).toBeNull();
    expect(read.problems).toEqual([]);
  });

  it("reads no test without the acid gases, rather than taking them for none", () => {
    const read = sheet(
      "separator test",
      "pressure [psia],temperature [degF],gas-oil ratio [scf/STB],gas gravity",
      "600,80,9000,0.7",
      "14.7,60,300,1.1",
      "condensate gravity [degAPI],55",
    );
    expect(read.separatorTest).toBeNull();
    expect(read.problems[0].message).toContain("hydrogen sulphide (0 where there is none)");
  });
});

describe("readLabSheet: the file", () => {
  it.each([
    ["nothing", ""],
    ["bytes that are no text", "\0\0\0"],
    ["an open quotation mark", 'composition\n"C1,90'],
    ["prose", "To whom it may concern"],
  ])("answers %s with a problem and nothing read", (_, text) => {
    const read = readLabSheet(text);
    expect(read).toMatchObject({ composition: null, depletion: null, stages: null });
    expect(read.problems).toHaveLength(1);
  });

  it("knows a table that was pasted without a heading", () => {
    const read = sheet("component\tmol %", "C1\t90", "C2\t10");
    expect(streamOf(read).light).toEqual({ C1: 90, C2: 10 });
    expect(read.read[0]).toContain("no heading");
  });

  it("says where a figure that it cannot read belongs, so that a screen can mark its cell", () => {
    const read = sheet(
      "composition",
      "component,mol %",
      "C1,9o",
      "C7+,10",
      "molecular weight of C7+,150",
      "specific gravity of C7+,0.79",
      "depletion",
      "temperature [degF],250",
      "dew point [psia],5000",
      "pressure [psia],liquid [%],C1 [mol %],C8 [mol %],C9+ [mol %]",
      "5000,0,90,2,1",
      "4000,tr,90,2?,1",
    );
    expect(read.problems.map(({ value, place }) => [value, place]).filter(([, at]) => at)).toEqual([
      ["9o", "composition.stream.light.C1"],
      ["tr", "depletion.rows.1.liquidPercent"],
      ["2?", "depletion.rows.1.producedGas.carbonNumbers.8"],
    ]);
  });

  it.each([
    ["a million commas", ",".repeat(1_000_000)],
    ["a million empty lines", "\n".repeat(1_000_000)],
    ["one endless cell", `composition\ncomponent,mol %\n${"C".repeat(900_000)},5`],
    ["endless spaces in a heading", `composition\na${" ".repeat(900_000)}b,mol %`],
    ["thousands of rows", `composition\n${"C1,5\n".repeat(100_000)}`],
    ["thousands of problems", `composition\ncomponent,mol %\n${"zzz,5\n".repeat(1900)}`],
  ])("is quick and brief with %s", (_, text) => {
    const started = performance.now();
    const read = readLabSheet(text);
    expect(performance.now() - started).toBeLessThan(2000);
    expect(read.problems.length).toBeGreaterThan(0);
    expect(read.problems.length).toBeLessThanOrEqual(101);
    expect(JSON.stringify(read).length).toBeLessThan(40_000);
  });

  /** Tables of one cell over and over, each as long as a request may be. */
  const longest = (heading: string, lines: number, columns: number, cell: (n: number) => string) =>
    `${heading}\n${Array.from({ length: lines }, (_, line) =>
      Array.from({ length: columns }, (_, column) => cell(line * columns + column)).join("\t"),
    ).join("\n")}`.slice(0, LONGEST_LAB_SHEET);

  it.each(
    ["", "composition", "depletion", "separators"].flatMap((heading) => [
      ["many words in every cell", longest(heading, 1990, 20, () => "a ".repeat(50).trim())],
      ["thousands of short words", longest(heading, 400, 99, () => "abcdefgh")],
      ["thousands of units", longest(heading, 400, 99, (n) => (n % 99 === 0 ? "name" : "psia"))],
      ["thousands of headings", longest(heading, 1990, 20, (n) => `Pressure ${n}`)],
    ]),
  )("reads a sheet of %s in less than a second of computing", (_, text) => {
    const before = process.cpuUsage();
    expect(readLabSheet(text).problems.length).toBeLessThanOrEqual(1000);
    expect(process.cpuUsage(before).user).toBeLessThan(1e6);
  });
});
