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

/** A named set of dependence, the book's own first. */
export interface DependenceChoice {
  id: string;
  name: string;
  isDefault: boolean;
}

/** What a person can choose the basis from. */
export interface BasisChoices {
  decks: readonly DeckChoice[];
  dependenceSets: readonly DependenceChoice[];
  /** the person may change sets, not only look at them */
  mayEditSets: boolean;
}

export interface BasisStripProps extends BasisChoices {
  /** parts that a page fixes itself (a frozen round fixes its deck and its estimates), with what they say */
  fixed?: Partial<Record<keyof Basis, string>>;
}

const words = {
  case: { low: "Low case", mid: "Mid case", high: "High case" },
  estimates: { approved: "Approved only", latest: "Drafts too" },
  interest: { gross: "Gross, 100 %", net: "Net to company" },
  risk: { unrisked: "Unrisked", risked: "Risked", yesNo: "Yes or no per trial" },
  units: { field: "Field units", metric: "Metric" },
} as const;

/** What a choice does, where its words alone do not say. */
const meanings: Partial<Record<string, string>> = {
  unrisked: "default; as if every field came",
  risked: "every trial times the field’s chance; means are exact",
  yesNo: "a field comes or does not, drawn trial by trial",
};

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
      note: meanings[value] ?? (value === defaultBasis[part] ? "default" : undefined),
      current: basis[part] === value,
      onSelect: () => change({ [part]: value }),
    })),
  };
}

/** The named sets, the book's own marked, and where they are kept. */
function dependencePart(
  sets: readonly DependenceChoice[],
  mayEdit: boolean,
  basis: Basis,
  change: Change,
  withBasis: (href: string) => string,
): Part {
  const chosen = sets.find(({ id, isDefault }) =>
    basis.dependence === "default" ? isDefault : id === basis.dependence,
  );
  const unknown = basis.dependence === "default" ? "The book’s own" : "A set that is not here";
  return {
    of: ["dependence"],
    name: "Dependence",
    value: chosen?.name ?? unknown,
    groups: [
      {
        heading: "How fields move together",
        entries: sets.map(({ id, name, isDefault }) => ({
          label: name,
          note: isDefault ? "default" : undefined,
          current: chosen?.id === id,
          onSelect: () => change({ dependence: isDefault ? "default" : id }),
        })),
      },
      {
        entries: [
          {
            label: mayEdit ? "Edit sets…" : "What the sets say…",
            href: withBasis("/portfolio/dependence"),
          },
        ],
      },
    ],
  };
}

/**
 * Says on what every number of the page stands. Each part opens to change it; what is not the
 * approved default turns warning ink.
 */
export function BasisStrip({ decks, dependenceSets, mayEditSets, fixed = {} }: BasisStripProps) {
  const { basis, setBasis, withBasis } = useBasis();
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

  const plainPart = (part: "estimates" | "interest" | "risk" | "units"): Part => ({
    of: [part],
    name: { estimates: "Estimates", interest: "Interest", risk: "Risk", units: "Units" }[part],
    value: (words[part] as Record<string, string>)[basis[part]],
    groups: [choices(part, basis, setBasis)],
  });

  const parts: Part[] = [
    {
      of: ["deck", "case"],
      name: "Prices",
      value: deckWords + caseWords,
      groups: [deckGroup, choices("case", basis, setBasis, "Case")],
    },
    ...(["estimates", "interest", "risk"] as const).map(plainPart),
    dependencePart(dependenceSets, mayEditSets, basis, setBasis, withBasis),
    plainPart("units"),
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
