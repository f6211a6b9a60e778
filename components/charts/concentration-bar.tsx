import { formatPercent } from "@/components/ui/format";
import type { Tone } from "./range-mark";

export interface ConcentrationBarProps {
  /** what is shared out: "Liquid value by field" */
  label: string;
  /** largest first; shares of the whole, 0 to 1 */
  parts: readonly { name: string; share: number }[];
  /** consecutive groups: how many parts each takes, and its words ("five fields") */
  bands: readonly { count: number; label: string }[];
  tone?: Tone;
}

/** How much the largest few carry: one bar, one slice a member, banded. */
export function ConcentrationBar({
  label,
  parts,
  bands,
  tone = "condensate",
}: ConcentrationBarProps) {
  const grouped = bands.map((band, index) => {
    const start = bands.slice(0, index).reduce((sum, { count }) => sum + count, 0);
    const members = parts.slice(start, start + band.count);
    return { ...band, members, share: members.reduce((sum, { share }) => sum + share, 0) };
  });
  const spoken = grouped.map(({ share, label: words }) => `${formatPercent(share)} ${words}`);

  return (
    <div className="concentration" data-tone={tone}>
      <div className="concentration-bar" role="img" aria-label={`${label}: ${spoken.join(", ")}`}>
        {grouped.flatMap(({ members }, band) =>
          members.map(({ name, share }) => (
            <i
              key={name}
              data-band={Math.min(band, 2)}
              style={{ width: `${(share * 100).toFixed(2)}%` }}
              title={`${name}, ${formatPercent(share)}`}
            />
          )),
        )}
      </div>
      <div className="concentration-labels" aria-hidden="true">
        {grouped.map(({ label: words, share }) => (
          <span key={words} style={{ width: `${(share * 100).toFixed(2)}%` }}>
            <b>{formatPercent(share)}</b> {words}
          </span>
        ))}
      </div>
    </div>
  );
}
