import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { ConcentrationBar } from "@/components/charts/concentration-bar";
import { DensityCurve } from "@/components/charts/density-curve";
import { Exceedance } from "@/components/charts/exceedance";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { Tornado } from "@/components/charts/tornado";
import { Figure } from "@/components/ui/figure";

const range = { p90: 20, p50: 50, p10: 80, mean: 52 };
const scale = { kind: "linear", domain: [0, 100] as [number, number] } as const;

describe("RangeMark", () => {
  const html = renderToStaticMarkup(
    <RangeMark name="Liquid value" range={range} unit="$ million" scale={scale} />,
  );

  it("reads out its name, its values and its unit", () => {
    expect(html).toContain(
      'aria-label="Liquid value: P90 20.0, P50 50.0, mean 52.0, P10 80.0 $ million"',
    );
  });

  it("can be reached by keyboard", () => {
    expect(html).toContain('role="img"');
    expect(html).toContain('tabindex="0"');
  });

  it("draws the line from P90 to P10, the tick at P50 and the dot at the mean", () => {
    expect(html).toContain('class="span" style="left:20.00%;width:60.00%"');
    expect(html).toContain('class="median" style="left:50.00%"');
    expect(html).toContain('class="mean" style="left:52.00%"');
  });

  it("draws no dot where the mean is not known", () => {
    const bare = { p90: 20, p50: 50, p10: 80 };
    const markup = renderToStaticMarkup(<RangeMark name="Area" range={bare} scale={scale} />);
    expect(markup).not.toContain('class="mean"');
    expect(markup).not.toContain("mean 52");
  });

  it("draws what it was as a box, and reads that out too", () => {
    const before = { p90: 10, p50: 30, p10: 60 };
    const markup = renderToStaticMarkup(
      <RangeMark name="Area" range={range} before={before} scale={scale} />,
    );
    expect(markup).toContain('class="before-box" style="left:10.00%;width:50.00%"');
    expect(markup).toContain("; before P90 10.0, P50 30.0, P10 60.0");
  });

  it("says that a line leaves its scale instead of ending it there", () => {
    const markup = renderToStaticMarkup(
      <RangeMark name="Area" range={{ p90: 20, p50: 50, p10: 180, mean: 120 }} scale={scale} />,
    );
    expect(markup).toContain('data-cut="high" style="left:20.00%;width:80.00%"');
    expect(markup).not.toContain('class="mean"');
    expect(markup).toContain("P10 180");
  });

  it("prints the three values under a large mark", () => {
    const markup = renderToStaticMarkup(
      <RangeMark name="Liquid value" range={range} scale={scale} size="large" />,
    );
    expect(markup).toContain("<dt>P90</dt><dd>20.0</dd>");
    expect(markup).toContain("<dt>P10</dt><dd>80.0</dd>");
  });

  it("says in words that there is no range", () => {
    for (const missing of [null, undefined, { p90: Number.NaN, p50: 1, p10: 2 }]) {
      const markup = renderToStaticMarkup(<RangeMark name="Area" range={missing} scale={scale} />);
      expect(markup).toBe('<span class="no-mark">No range</span>');
    }
  });
});

describe("RangeScale", () => {
  it("prints the ticks at which the marks of its column draw their rules", () => {
    const log = { kind: "log", domain: [1, 1000] as [number, number] } as const;
    const heading = renderToStaticMarkup(<RangeScale scale={log} />);
    const mark = renderToStaticMarkup(
      <RangeMark name="x" range={{ p90: 2, p50: 5, p10: 9 }} scale={log} />,
    );
    const lefts = [...heading.matchAll(/<i style="(left:[\d.]+%)"/g)].map(([, left]) => left);
    expect(lefts).toHaveLength(4);
    for (const left of lefts) expect(mark).toContain(`class="grid-line" style="${left}"`);
  });
});

describe("Exceedance", () => {
  const curve = { values: [10, 20, 50, 80, 100], probabilities: [1, 0.9, 0.5, 0.1, 0] };
  const html = renderToStaticMarkup(
    <Exceedance
      name="Sales gas"
      unit="Bscf"
      curve={curve}
      range={range}
      arithmetic={{ p90: 12, p10: 95 }}
    />,
  );

  it("reads out the percentiles and names the arithmetic sums as such", () => {
    expect(html).toContain(
      "Exceedance curve. Sales gas: P90 20.0, P50 50.0, mean 52.0, P10 80.0 Bscf. " +
        "Arithmetic sum of the P90s 12.0, of the P10s 95.0.",
    );
  });

  it("marks the arithmetic sums as diamonds", () => {
    expect(html.match(/data-shape="diamond"/g)).toHaveLength(2);
  });

  it("keeps coordinates finite", () => {
    expect(html).not.toMatch(/NaN|Infinity/);
  });
});

describe("DensityCurve", () => {
  const points = [0, 1, 2, 3, 4].map((x) => ({ x, density: 4 - Math.abs(x - 2) ** 2 }));

  it("reads out the percentiles and the usual range", () => {
    const html = renderToStaticMarkup(
      <DensityCurve
        name="Porosity"
        unit="fraction"
        points={points}
        range={{ p90: 1, p50: 2, p10: 3 }}
        usual={{ low: 0.5, high: 9 }}
      />,
    );
    expect(html).toContain("Porosity density: P90 1.00, P50 2.00, P10 3.00 fraction; usual");
    expect(html).toContain('class="usual" style="left:12.50%;width:87.50%"');
  });
});

describe("Tornado", () => {
  const html = renderToStaticMarkup(
    <Tornado
      name="Condensate to the tank"
      unit="MMSTB"
      centre={40}
      drivers={[
        { name: "Area", atP90: 20, atP10: 80, share: 0.7 },
        { name: "Water saturation", atP90: 44, atP10: 36, share: 0.004 },
      ]}
    />,
  );

  it("is a table of inputs, of results at both ends, and of shares", () => {
    expect(html).toContain('role="table" aria-label="What drives Condensate to the tank, MMSTB"');
    expect(html.match(/role="rowheader"/g)).toHaveLength(2);
    expect(html).toContain("70\u00a0%");
    expect(html).toContain("&lt;1\u00a0%");
  });

  it("draws an input that works the other way on the other side", () => {
    // 44 lies right of the centre (33.33 %), 36 left of it.
    expect(html).toContain('class="low" style="left:33.33%;width:6.67%"');
    expect(html).toContain('class="high" style="left:26.67%;width:6.67%"');
  });
});

describe("ConcentrationBar", () => {
  it("says how much each band carries", () => {
    const html = renderToStaticMarkup(
      <ConcentrationBar
        label="Liquid value by field"
        parts={[
          { name: "A", share: 0.5 },
          { name: "B", share: 0.3 },
          { name: "C", share: 0.2 },
        ]}
        bands={[
          { count: 1, label: "one field" },
          { count: 2, label: "two others" },
        ]}
      />,
    );
    expect(html).toContain(
      'aria-label="Liquid value by field: 50\u00a0% one field, 50\u00a0% two others"',
    );
  });
});

describe("Figure", () => {
  it("keeps the full value for the hover, and the fraction in a box of the column's width", () => {
    const html = renderToStaticMarkup(<Figure value={45.2345} unit="MMSTB" fraction={2} />);
    expect(html).toContain('title="45.2345 MMSTB"');
    expect(html).toContain('style="width:calc(2ch + .28em)">.2</span>');
  });

  it("writes an en dash without a title for what is missing", () => {
    expect(renderToStaticMarkup(<Figure value={null} />)).toBe(
      '<span class="figure"><span>–</span></span>',
    );
  });
});
