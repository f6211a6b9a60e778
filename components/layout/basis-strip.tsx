"use client";

import { RangeKey } from "@/components/charts/range-mark";
import { defaultBasis, type Basis } from "@/components/basis/basis";
import { useBasis } from "@/components/basis/use-basis";
import { Menu, type MenuGroup } from "@/components/ui/choice";
import { formatDate } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import { standardConditions } from "@/analytics/units/standard-conditions";

/** A published price deck, latest first. */
export interface DeckChoice {
  id: string;
  /** "Deck v3" */
  name: string;
  asOf: string;
}

export interface BasisStripProps {
  decks: readonly DeckChoice[];
  /** parts that a page fixes itself (a frozen round fixes its deck and its estimates), with what they say */
  fixed?: Partial<Record<keyof Basis, string>>;
}

const words = {
  case: { low: "Low case", mid: "Mid case", high: "High case" },
  estimates: { approved: "Approved only", latest: "Drafts too" },
  interest: { gross: "Gross, 100 %", net: "Net to company" },
  risk: { unrisked: "Unrisked", risked: "Risked" },
  units: { field: "Field units", metric: "Metric" },
} as const;

type Change = (change: Partial<Basis>) => void;

function choices<Part extends keyof typeof words>(
  part: Part,
  basis: Basis,
  change: Change,
  heading?: string,
): MenuGroup {
  const entries = Object.entries(words[part]) as [Basis[Part], string][];
  return {
    heading,
    entries: entries.map(([value, label]) => ({
      label,
      note: value === defaultBasis[part] ? "default" : undefined,
      current: basis[part] === value,
      onSelect: () => change({ [part]: value }),
    })),
  };
}

/**
 * Says on what every number of the page stands. Each part opens to change it; what is not the
 * approved default turns warning ink.
 */
export function BasisStrip({ decks, fixed = {} }: BasisStripProps) {
  const { basis, setBasis } = useBasis();
  const latest = decks[0];
  const deck = basis.deck === "latest" ? latest : decks.find(({ id }) => id === basis.deck);
  const deckWords = deck ? `${deck.name}, ${formatDate(deck.asOf)}` : "No published deck";
  const caseWords = basis.case === "mid" ? "" : `, ${words.case[basis.case].toLowerCase()}`;

  const deckGroup: MenuGroup = {
    heading: "Price deck",
    entries: decks.map(({ id, name, asOf }, index) => ({
      label: name,
      note: `${formatDate(asOf)}${index === 0 ? ", latest" : ""}`,
      current: deck?.id === id,
      onSelect: () => setBasis({ deck: index === 0 ? "latest" : id }),
    })),
  };
  const baseGroup: MenuGroup = {
    heading: "Gas volumes at",
    entries: (Object.keys(standardConditions) as Basis["base"][]).map((base) => ({
      label: standardConditions[base].label,
      note: base === defaultBasis.base ? "default" : undefined,
      current: basis.base === base,
      onSelect: () => setBasis({ base }),
    })),
  };

  const parts: Part[] = [
    {
      of: ["deck", "case"],
      name: "Prices",
      value: deckWords + caseWords,
      groups: [deckGroup, choices("case", basis, setBasis, "Case")],
    },
    ...(["estimates", "interest", "risk", "units"] as const).map((part) => ({
      of: [part],
      name: { estimates: "Estimates", interest: "Interest", risk: "Risk", units: "Units" }[part],
      value: (words[part] as Record<string, string>)[basis[part]],
      groups: [choices(part, basis, setBasis)],
    })),
    { of: ["base"], name: "At", value: standardConditions[basis.base].label, groups: [baseGroup] },
  ];

  return (
    <section className="basis-strip" aria-label="Basis of every number on this page">
      <em>Basis</em>
      {parts.map((part) => (
        <BasisPartMenu
          key={part.name}
          part={part}
          fixedWords={part.of.map((key) => fixed[key]).find(Boolean)}
          changed={part.of.some((key) => basis[key] !== defaultBasis[key])}
        />
      ))}
      <div className="basis-key">
        <span className="key-words">How to read a mark:</span>
        <RangeKey />
        <span className="key-words">tick P50, dot mean</span>
      </div>
    </section>
  );
}

interface Part {
  of: (keyof Basis)[];
  name: string;
  value: string;
  groups: MenuGroup[];
}

function BasisPartMenu({
  part,
  fixedWords,
  changed,
}: {
  part: Part;
  fixedWords?: string;
  changed: boolean;
}) {
  if (fixedWords) {
    return (
      <span className="basis-part" title="Fixed by this page">
        <span className="part-name">{part.name}</span>
        <span className="part-value">{fixedWords}</span>
        <Icon name="lock" size={9} />
      </span>
    );
  }
  return (
    <Menu
      buttonClassName="basis-part"
      changed={changed}
      groups={part.groups}
      button={
        <>
          <span className="part-name">{part.name}</span>
          <span className="part-value">{part.value}</span>
          {changed && <span className="sr-only">, not the default</span>}
          <Icon name="chevron-down" size={9} />
        </>
      }
    />
  );
}
