"use client";

import { Fragment } from "react";
import Link from "next/link";
import type { AttentionView, Statement } from "@/app/api/v1/portfolio/schema";
import { useBasis } from "@/components/basis/use-basis";
import {
  capital,
  listWords,
  moneyWords,
  numberWords,
  type Reporting,
} from "@/components/portfolio/reporting";
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
  const { basis, withBasis } = useBasis();
  const words: Words = {
    liquid: liquidOf(statement, reporting),
    reporting,
    ifItComes: basis.risk === "yesNo" ? "When it comes, " : "",
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
  /** before the width of a range, where a field may come to nothing */
  ifItComes: string;
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

const cautionAsides: Record<string, string> = {
  sour_gas: "Sour",
  high_pressure_high_temperature: "HPHT",
};

function cautionWords(code: string, hydrogenSulphide: number | null): string {
  switch (code) {
    case "sour_gas":
      return `${hydrogenSulphide ? `${formatPercent(hydrogenSulphide, { decimals: 1 })} hydrogen sulphide` : "Hydrogen sulphide"}: people, wells and plant need sour-service design.`;
    case "high_pressure_high_temperature":
      return "High pressure and temperature: wells and equipment need a design review of their own.";
    default:
      return `${capital(code.replaceAll("_", " "))}.`;
  }
}

const sampleWords = (samples: number) =>
  samples === 0
    ? "no laboratory sample supports it"
    : `${numberWords(samples)} laboratory sample${samples === 1 ? " supports" : "s support"} it`;

function waitingFinding(item: Waiting, words: Words): Finding {
  const submitted = item.kind === "submitted";
  const [first] = item.revisions;
  const sameRevision = item.revisions.every(({ revision }) => revision === first.revision);
  const places = listWords(item.revisions.map(({ reservoirName }) => reservoirName));
  const several = item.revisions.length > 1;
  const change = item.changeStb;
  const effect =
    change === null
      ? ""
      : ` Approved as ${several ? "they stand, they" : "it stands, it"} would ${changeWords(change, words)} ${change < 0 ? "from" : "to"} the mean ${words.liquid.name}.`;
  return {
    tone: submitted ? "waiting" : "warning",
    title: words.link(
      several ? `/fields/${item.fieldSlug}` : `/fields/${item.fieldSlug}/${first.reservoirSlug}`,
      sameRevision ? `${item.name}, revision ${first.revision}` : item.name,
    ),
    detail: submitted
      ? `${places} ${several ? "wait" : "waits"} for a reviewer.${effect}`
      : `${places} ${several ? "were" : "was"} returned and nobody has taken ${several ? "them" : "it"} up.`,
    aside: (
      <>
        {submitted ? "In review" : "Returned"}
        <br />
        {daysWords(item.days)}
      </>
    ),
  };
}

type Waiting = Extract<AttentionView, { kind: "submitted" | "returned" }>;

function findingOf(item: AttentionView, words: Words): Finding {
  const { reporting, link, ifItComes } = words;
  switch (item.kind) {
    case "submitted":
    case "returned":
      return waitingFinding(item, words);
    case "field": {
      const wide =
        item.spread !== null &&
        `${ifItComes}P10 is ${formatFigure(item.spread, { digits: 2 })} times P90, on ${formatPercent(item.share)} of the liquid; ${sampleWords(item.samples)}.`;
      const cautions = item.cautions.map((code) => cautionWords(code, item.hydrogenSulphide));
      const asides = [
        ...(item.spread === null ? [] : ["Wide range"]),
        ...item.cautions.map((code) => cautionAsides[code] ?? "Caution"),
      ];
      return {
        tone: "warning",
        title: link(`/fields/${item.fieldSlug}`, item.name),
        detail: [wide, ...cautions].filter(Boolean).join(" "),
        aside: asides.map((aside) => (
          <span key={aside} className="block">
            {aside}
          </span>
        )),
      };
    }
    case "unmeasured":
      return {
        tone: "warning",
        title: (
          <>
            {item.fields.map(({ name, fieldSlug }, index) => (
              <Fragment key={fieldSlug}>
                {index > 0 && (index === item.fields.length - 1 ? " and " : ", ")}
                {link(`/fields/${fieldSlug}`, name)}
              </Fragment>
            ))}
          </>
        ),
        detail: `Recoveries come from a correlation or an untuned equation of state, on ${formatPercent(item.share)} of the liquid; no measured depletion stands behind ${item.fields.length === 1 ? "it" : "them"}.`,
        aside: "Not measured",
      };
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
        aside: "Price",
      };
    }
  }
}
