"use client";

import Link from "next/link";
import type { AttentionView, Statement } from "@/app/api/v1/portfolio/schema";
import { useBasis } from "@/components/basis/use-basis";
import { capital, listWords, moneyWords, type Reporting } from "@/components/portfolio/reporting";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { FindingList, type Finding } from "@/components/ui/statement";
import { liquidOf, type Liquid } from "./liquid";

/** Facts of the book that somebody should look at, most pressing first. */
export function AttentionSection({
  statement,
  reporting,
}: {
  statement: Statement;
  reporting: Reporting;
}) {
  const { withBasis } = useBasis();
  const words: Words = {
    liquid: liquidOf(statement, reporting),
    reporting,
    link: (href, name) => <Link href={withBasis(href)}>{name}</Link>,
  };
  return (
    <Section title="What needs attention">
      <FindingList ordered findings={statement.attention.map((item) => findingOf(item, words))} />
    </Section>
  );
}

interface Words {
  liquid: Liquid;
  reporting: Reporting;
  link: (href: string, name: string) => React.ReactNode;
}

const daysWords = (days: number) =>
  days === 0 ? "today" : `${days} ${days === 1 ? "day" : "days"}`;

/** "+$206 million", "−1.2 MMSTB" */
function changeWords(barrels: number, { liquid, reporting }: Words): string {
  const amount = barrels * liquid.perStb;
  const size = liquid.isMoney
    ? moneyWords(Math.abs(amount) / reporting.money.factor, reporting.currency)
    : `${formatFigure(Math.abs(amount))} ${liquid.unit}`;
  return `${amount < 0 ? "take away" : "add"} ${size}`;
}

const cautionWords: Record<string, { aside: string; detail: string }> = {
  sour_gas: {
    aside: "Sour",
    detail: "Hydrogen sulphide harms people and steel; plan wells and plant for sour service.",
  },
  high_pressure_high_temperature: {
    aside: "HPHT",
    detail: "High pressure and temperature: equipment and well design need their own review.",
  },
};

function findingOf(item: AttentionView, words: Words): Finding {
  const { liquid, reporting, link } = words;
  switch (item.kind) {
    case "submitted":
    case "returned": {
      const submitted = item.kind === "submitted";
      const effect =
        item.changeStb === null
          ? ""
          : ` Approved as it stands, it would ${changeWords(item.changeStb, words)} ${item.changeStb < 0 ? "of" : "to the"} mean ${liquid.name}.`;
      return {
        tone: submitted ? "waiting" : "warning",
        title: link(
          `/fields/${item.fieldSlug}/${item.reservoirSlug}`,
          `${item.name}, revision ${item.revision}`,
        ),
        detail: submitted
          ? `${item.reservoirName} waits for a reviewer.${effect}`
          : `${item.reservoirName} was returned and nobody has taken it up.`,
        aside: (
          <>
            {submitted ? "In review" : "Returned"}
            <br />
            {daysWords(item.days)}
          </>
        ),
      };
    }
    case "wide":
      return {
        tone: "warning",
        title: link(`/fields/${item.fieldSlug}`, item.name),
        detail: `P10 is ${formatFigure(item.spread, { digits: 2 })} times P90, on ${formatPercent(item.share)} of the liquid. ${item.samples === 0 ? "No laboratory sample supports it." : `${item.samples === 1 ? "One laboratory sample supports" : `${item.samples} laboratory samples support`} it.`}`,
        aside: "Wide range",
      };
    case "caution": {
      const known = item.codes.map(
        (code) => cautionWords[code] ?? { aside: "Caution", detail: code.replaceAll("_", " ") },
      );
      const sour =
        item.codes.includes("sour_gas") && item.hydrogenSulphide
          ? `${formatPercent(item.hydrogenSulphide, { decimals: 2 })} H₂S. `
          : "";
      return {
        tone: "warning",
        title: link(`/fields/${item.fieldSlug}`, item.name),
        detail: sour + known.map(({ detail }) => detail).join(" "),
        aside: known.map(({ aside }) => aside).join(", "),
      };
    }
    case "no_estimate":
      return {
        title: link("/fields?state=none", listWords(item.names)),
        detail: `${item.names.length === 1 ? "It has" : "They have"} no estimate on this basis and ${item.names.length === 1 ? "is" : "are"} in no total.`,
        aside: "Not counted",
      };
    case "basin":
      return {
        title: `${item.name} basin`,
        detail: `${formatPercent(item.shareOfVariance)} of the portfolio’s variance comes from here, and its fields move together: rank correlation ${item.rankCorrelation.toFixed(2)}.`,
        aside: "Dependence",
      };
    case "price": {
      const barrels = item.condensateMeanStb * reporting.condensate.factor;
      return {
        title: link("/prices", "Condensate price"),
        detail: `Each ${reporting.currency}1 per STB moves the mean liquid value by ${moneyWords(item.condensateMeanStb, reporting.currency)}: there are ${formatFigure(barrels)} ${reporting.condensate.unit} behind it.`,
        aside: capital("price"),
      };
    }
  }
}
