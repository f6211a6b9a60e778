import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { DepletionPanels } from "@/components/fluid/depletion-panels";
import { routeWords } from "@/components/fluid/available-curves";
import { layoutLabels } from "@/components/fluid/label-layout";
import { areaInside, partsInside, roundScale, spread } from "@/components/fluid/plot-scale";
import { envelopeFinding, PhaseEnvelope } from "@/components/fluid/phase-envelope";
import { partAndPlace, takeLabSheet } from "@/components/fluid/take-lab-sheet";
import { newSampleText } from "@/components/fluid/sample-text";
import { equationOfState, labSheet } from "./fixtures";

describe("envelopeFinding(result, initialPressure)", () => {
  const { envelope, train } = equationOfState;
  const saturation = {
    upperPsia: 4310,
    kind: "dewPoint" as const,
    lowerDewPointPsia: null,
    measuredPsia: null,
    mismatchPsia: null,
  };

  it("goes by the measured dew point where there is one", () => {
    const measured = { ...saturation, measuredPsia: 4424, mismatchPsia: -114 };
    expect(
      envelopeFinding({ saturation: measured, isTuned: false, envelope, train }, 5898, 255),
    ).toBe("Liquid starts to drop out 1,470 psi below initial pressure");
  });

  it("never states an untuned figure as fact", () => {
    expect(envelopeFinding({ saturation, isTuned: false, envelope, train }, 5898, 255)).toMatch(
      /^Untuned, not fitted: /,
    );
    expect(envelopeFinding({ saturation, isTuned: true, envelope, train }, 4000, 255)).toBe(
      "Initial pressure lies 310 psi below the dew point",
    );
  });

  it("says when nothing drops out, whatever dew point was measured", () => {
    const none = { ...saturation, upperPsia: null, kind: "none" as const, measuredPsia: 4424 };
    const fluid = { saturation: none, isTuned: true, envelope };
    expect(envelopeFinding({ ...fluid, train }, 5000, 750)).toBe(
      "No dew point at 750 °F: the computed cricondentherm is 620 °F",
    );
    expect(envelopeFinding({ ...fluid, train: null }, 5000, 255)).toBe(
      "Dry gas: no liquid drops out",
    );
  });

  it("says that a fluid with a bubble point is an oil, and who says so against a measurement", () => {
    const oil = { ...saturation, upperPsia: 2894, kind: "bubblePoint" as const };
    const fluid = { isTuned: false, envelope, train };
    expect(envelopeFinding({ ...fluid, saturation: oil }, 5000, 255)).toBe(
      "This is an oil at reservoir temperature (bubble point 2,894 psia)",
    );
    expect(
      envelopeFinding({ ...fluid, saturation: { ...oil, measuredPsia: 3000 } }, 5000, 255),
    ).toMatch(/^By the equation of state this is an oil/);
  });
});

describe("PhaseEnvelope", () => {
  const draw = (isTuned: boolean) =>
    renderToStaticMarkup(
      <PhaseEnvelope
        result={{ ...equationOfState, isTuned }}
        temperatureDegF={255}
        initialPressurePsia={5900}
        abandonmentPressurePsia={1000}
        stages={[
          { pressurePsia: 615, temperatureDegF: 85 },
          { pressurePsia: 14.696, temperatureDegF: 60 },
        ]}
        fileName="envelope"
      />,
    );

  it("dashes an untuned envelope and says so in words, and draws a tuned one firm", () => {
    expect(draw(false)).toContain("Untuned");
    expect(draw(false)).toMatch(/class="line line-dashed" d="M/);
    expect(draw(true)).not.toContain("Untuned");
    expect(draw(true)).not.toMatch(/class="line line-dashed"/);
  });

  it("sets the computed dew point beside the measured one with the difference", () => {
    const html = draw(false);
    expect(html).toContain("Computed dew point 5,201 psia, measured 5,215: \u221214.0 psi");
    expect(html).not.toMatch(/NaN|Infinity/);
  });
});

describe("DepletionPanels", () => {
  const curve = {
    route: "untunedEquationOfState" as const,
    ...routeWords.untunedEquationOfState,
    curve: equationOfState.curve!,
  };
  const html = renderToStaticMarkup(
    <DepletionPanels
      curve={curve}
      others={[]}
      measured={[{ pressurePsia: 3000, liquidPercent: 14 }]}
      initialPressurePsia={5900}
      producedBefore={0.1}
      criticalBand={{ low: 10, high: 20 }}
      waterSaturation={0.2}
      abandonmentRange={{ p90: 800, p10: 1400 }}
      abandonmentPressurePsia={1000}
      onAbandon={() => undefined}
      fileName="depletion"
    />,
  );

  it("is a slider between the lowest pressure of the curve and its dew point", () => {
    expect(html).toMatch(
      /role="slider"[^>]*aria-valuemin="1000" aria-valuemax="5215" aria-valuenow="1000"/,
    );
  });

  it("counts what came above the dew point into what reaches the tank", () => {
    // 0.1 + 0.9 x 0.29
    expect(html).toMatch(/Condensate to the tank<\/dt><dd><span[^>]*><span>36<\/span>\.1/);
  });

  it("marks an untuned curve in its heading and by dashes", () => {
    expect(html).toContain("Untuned: liquid takes up to 20.0 % of the gas’s pore space");
    expect(html).toMatch(/class="line line-dashed"/);
  });
});

describe("takeLabSheet(read, now)", () => {
  it("puts a cell that could not be read back where it is to be put right", () => {
    const { change, remarks } = takeLabSheet(labSheet, newSampleText(null));
    expect(change.depletion?.cells["rows.1.gasZ"]).toBe("0.9e1?");
    expect(remarks.depletion["rows.1.gasZ"]).toBe(
      "Line 31 of the file has \u201c0.9e1?\u201d. This is not a number.",
    );
    expect(change.composition?.cells["stream.light.C1"]).toBe("90");
    expect(change).not.toHaveProperty("separator");
  });

  it("knows which sheet a place is in", () => {
    expect(partAndPlace("depletion.rows.3.gasZ")).toEqual({
      part: "depletion",
      place: "rows.3.gasZ",
    });
    expect(partAndPlace("elsewhere.x")).toBeNull();
  });
});

describe("plot scales", () => {
  it("ends on round figures", () => {
    expect(roundScale([0, 5898], { count: 6 }).domain).toEqual([0, 6000]);
    expect(roundScale([-93, 415], { fromZero: false }).domain).toEqual([-200, 600]);
  });

  it("cuts a line at the edges of the picture, into the parts inside", () => {
    const line = [
      [-10, 0],
      [10, 20],
      [30, 40],
      [40, -40],
      [60, -40],
      [60, 50],
    ] as const;
    expect(partsInside(line)).toEqual([
      [
        [0, 10],
        [10, 20],
        [30, 40],
        [35, 0],
      ],
      [
        [60, 0],
        [60, 50],
      ],
    ]);
    expect(
      partsInside([
        [120, 0],
        [130, 90],
      ]),
    ).toEqual([]);
  });

  it("cuts an area at the edges of the picture", () => {
    const area = areaInside([
      [50, -100],
      [150, 100],
      [-50, 100],
    ]);
    for (const [x, y] of area) {
      expect(Math.min(x, y)).toBeGreaterThanOrEqual(-1e-9);
      expect(Math.max(x, y)).toBeLessThanOrEqual(100 + 1e-9);
    }
    expect(area).toContainEqual([100, 0]);
  });

  it("keeps labels in the picture and off each other", () => {
    const box = { width: 300, height: 400 };
    const texts = [
      { x: 60, y: 40, lines: ["Dew point 4,424 measured,", "4,423 tuned"], side: "right" as const },
      { x: 55, y: 41, lines: ["Critical point"], side: "left" as const },
      { x: 60, y: 42, lines: ["Initial 4,500"], side: "right" as const },
    ];
    const placed = layoutLabels(texts, box);
    expect(placed[0].side).toBe("left");
    placed.forEach(({ block }, i) => {
      expect(block.left).toBeGreaterThanOrEqual(0);
      expect(block.right).toBeLessThanOrEqual(box.width);
      for (const other of placed.slice(i + 1).map((placement) => placement.block)) {
        const apart =
          Math.abs(block.middle - other.middle) >= (block.height + other.height) / 2 - 1;
        expect(apart || block.left > other.right || other.left > block.right).toBe(true);
      }
    });
  });

  it("moves labels apart and keeps their order", () => {
    const [a, b, c] = spread([50, 51, 90], 6);
    expect(b - a).toBeCloseTo(6, 6);
    expect(c).toBe(90);
  });
});
