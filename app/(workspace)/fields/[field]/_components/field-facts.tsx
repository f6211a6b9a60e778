import type { FieldView } from "@/app/api/v1/fields/schema";
import { prmsClassNames, prmsSubClassNames } from "@/components/fields/prms";
import { formatPercent, MISSING } from "@/components/ui/format";
import { Section } from "@/components/ui/section";

const degrees = (value: number, positive: string, negative: string) =>
  `${Math.abs(value).toFixed(2)}° ${value >= 0 ? positive : negative}`;

/** What the field is, for whoever does not know it. */
export function FieldFacts({ field }: { field: FieldView }) {
  const { latitude, longitude, waterDepthFt } = field;
  const facts: [string, string][] = [
    ["Basin", field.basin.name],
    ["Operator", field.operator],
    ["Working interest", formatPercent(field.workingInterest, { decimals: 1 })],
    ["Net revenue interest", formatPercent(field.netRevenueInterest, { decimals: 2 })],
    ["Class", prmsClassNames[field.prmsClass]],
    ["Sub-class", prmsSubClassNames[field.prmsSubClass]],
    ["Chance of commerciality", formatPercent(field.chanceOfCommerciality)],
    ["Responsible engineer", field.responsibleEngineer?.name ?? MISSING],
    [
      "Position",
      latitude === null || longitude === null
        ? MISSING
        : `${degrees(latitude, "N", "S")}, ${degrees(longitude, "E", "W")}`,
    ],
    [
      "Water depth",
      waterDepthFt === null ? "on land" : `${waterDepthFt.toLocaleString("en-US")} ft`,
    ],
  ];
  return (
    <Section title="The field">
      <table className="ledger-table">
        <caption className="sr-only">Facts about the field</caption>
        <tbody>
          {facts.map(([label, value]) => (
            <tr key={label}>
              <th scope="row" className="plain soft">
                {label}
              </th>
              <td className="wrap">{value}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {field.notes && <p className="mt-3 text-13">{field.notes}</p>}
    </Section>
  );
}
