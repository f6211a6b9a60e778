import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Bridge } from "@/components/charts/bridge";
import { csvOf } from "@/components/ui/download";
import { KeyFigures } from "@/components/ui/statement";
import { ColumnHeading, FigureCell } from "@/components/ui/table";

describe("Bridge", () => {
  const html = renderToStaticMarkup(
    <Bridge
      quantity="Mean liquid value, $ million"
      from={{ label: "Budget 2026", value: 5560 }}
      steps={[
        { label: "Revisions", change: 245 },
        { label: "Interest", change: -58 },
      ]}
      to={{ label: "Budget 2027", value: 5747 }}
    />,
  );

  it("prints steps with the decimals of the total, so that they add up as read", () => {
    expect(html).toContain(
      "Budget 2026 5,560, Revisions +245, Interest \u221258, Budget 2027 5,747",
    );
  });

  it("draws a fall as a hollow bar of its own class", () => {
    expect(html.match(/class="bridge-fall"/g)).toHaveLength(2);
    expect(html.match(/class="bridge-rise"/g)).toHaveLength(2);
  });

  it("says that its axis does not start at zero, beside the plot and over the bars of a phone", () => {
    expect(html).toMatch(/\(axis starts at 5,[0-9]00, not at 0\)/);
    expect(html).toMatch(/<caption[^>]*>[^<]*axis starts at 5,[0-9]00, not at 0\.<\/caption>/);
  });

  it("starts at zero where the steps are as large as the total, and holds a total below zero", () => {
    const markup = renderToStaticMarkup(
      <Bridge
        quantity="NPV"
        from={{ label: "a", value: 10 }}
        steps={[{ label: "fall", change: -30 }]}
        to={{ label: "b", value: -20 }}
      />,
    );
    expect(markup).not.toMatch(/NaN|Infinity|height="-/);
  });
});

describe("csvOf", () => {
  it("quotes what needs it, defuses formulas in text, and leaves negative numbers alone", () => {
    expect(
      csvOf(
        ["Field", "NPV [$ million]"],
        [
          ["A, B", -75.1],
          ["=HYPERLINK()", null],
        ],
      ),
    ).toBe('\ufeffField,NPV [$ million]\r\n"A, B",-75.1\r\n\'=HYPERLINK(),\r\n');
  });
});

describe("ColumnHeading", () => {
  it("tells how its column is sorted", () => {
    const html = renderToStaticMarkup(<ColumnHeading sorted="descending">Mean</ColumnHeading>);
    expect(html).toContain('aria-sort="descending"');
    expect(
      renderToStaticMarkup(<ColumnHeading sortHref="?sort=mean">Mean</ColumnHeading>),
    ).toContain('aria-sort="none"');
    expect(renderToStaticMarkup(<ColumnHeading>Mean</ColumnHeading>)).not.toContain("aria-sort");
  });
});

describe("FigureCell", () => {
  it("sets before over after, and says which is which", () => {
    const html = renderToStaticMarkup(<FigureCell value={121} before={92} />);
    expect(html).toMatch(/before <.*>92<\/span>\.0.*now <.*>121</);
  });
});

describe("KeyFigures", () => {
  it("names the figures it stands for", () => {
    const html = renderToStaticMarkup(
      <KeyFigures label="Totals" figures={[{ label: "Gas", figure: "1,800", unit: "Bscf" }]} />,
    );
    expect(html).toContain('aria-label="Totals"');
    expect(html).toContain("<h2>Gas</h2>");
  });
});
