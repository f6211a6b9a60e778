/**
 * Two years of revisions. A revision starts from the reservoir's current ranges (`reservoirs.ts`) and says how the
 * ranges of that day differed, as a factor on both ends. Later revisions converge on the current ranges, the way
 * appraisal does.
 */
import type { ProducingConcept } from "@/analytics/recovery/recovery-plan-schema";
import type { InputName } from "@/analytics/volumetrics/inputs-schema";

export type DemoState = "superseded" | "approved" | "returned" | "submitted" | "draft";

export interface DemoRevision {
  on: string;
  state: DemoState;
  /** factors on both ends of a range, for what was believed differently on that day */
  factors: Partial<Record<InputName, number>>;
  /** a factor on the distance of both ends from their middle: above 1 was less certain */
  spread?: number;
  /** another way of producing than the approved one, where recoveries follow from the fluid */
  concept?: ProducingConcept;
  note: string;
  decision?: { on: string; note: string };
}

/** What a typical field went through; `variant` picks one, so that no two neighbours tell the same story. */
const stories: DemoRevision[][] = [
  [
    {
      on: "2024-10-30",
      state: "superseded",
      factors: { areaAcres: 0.86, condensateYieldStbPerMmscf: 0.93 },
      spread: 1.35,
      note: "First estimate, from the regional map and one well.",
      decision: {
        on: "2024-11-12",
        note: "Fit for screening. Ranges are wide, as they should be with one well.",
      },
    },
    {
      on: "2025-10-14",
      state: "superseded",
      factors: { porosity: 1.04, condensateYieldStbPerMmscf: 0.98 },
      spread: 1.12,
      note: "Porosity from core; area from the new structure map.",
      decision: { on: "2025-10-27", note: "Core and log agree. Approved." },
    },
    {
      on: "2026-10-06",
      state: "approved",
      factors: {},
      note: "Separator test repeated at stable rate; yield follows it.",
      decision: { on: "2026-10-19", note: "Test sheet checked against the balance. Approved." },
    },
  ],
  [
    {
      on: "2024-11-04",
      state: "superseded",
      factors: { netThicknessFt: 0.9, waterSaturation: 1.08 },
      spread: 1.28,
      note: "First estimate after the discovery well.",
      decision: {
        on: "2024-11-20",
        note: "Approved for the round, with a note to core the next well.",
      },
    },
    {
      on: "2026-09-28",
      state: "approved",
      factors: {},
      note: "Appraisal well raised net thickness and settled saturation.",
      decision: { on: "2026-10-13", note: "Net-to-gross cut-offs seen and agreed." },
    },
  ],
  [
    {
      on: "2024-10-22",
      state: "superseded",
      factors: { areaAcres: 1.14, condensateRecovery: 0.92 },
      spread: 1.3,
      note: "Area to the spill point; recovery from analogues.",
      decision: { on: "2024-11-08", note: "Spill point is optimistic, kept as the high case." },
    },
    {
      on: "2025-06-17",
      state: "superseded",
      factors: { areaAcres: 1.05, condensateRecovery: 0.96 },
      spread: 1.15,
      note: "Contact found up-dip of spill; area cut.",
      decision: { on: "2025-07-01", note: "Pressure gradients support the contact." },
    },
    {
      on: "2025-11-11",
      state: "superseded",
      factors: { condensateRecovery: 0.98 },
      spread: 1.06,
      note: "Recovery narrowed after the depletion study.",
      decision: { on: "2025-11-25", note: "Approved." },
    },
    {
      on: "2026-10-20",
      state: "approved",
      factors: {},
      note: "Year of production history added; ranges narrowed.",
      decision: { on: "2026-11-02", note: "Pressure decline fits the middle case. Approved." },
    },
  ],
  [
    {
      on: "2025-02-05",
      state: "superseded",
      factors: { condensateYieldStbPerMmscf: 1.06, netThicknessFt: 0.95 },
      spread: 1.25,
      note: "First estimate; yield from the well-site test.",
      decision: { on: "2025-02-19", note: "Well-site yields run high. Approved with that remark." },
    },
    {
      on: "2025-12-02",
      state: "superseded",
      factors: { netThicknessFt: 1.02 },
      spread: 1.1,
      note: "Laboratory sheet replaces the well-site yield.",
      decision: { on: "2025-12-16", note: "Approved." },
    },
    {
      on: "2026-11-03",
      state: "approved",
      factors: {},
      note: "Depth conversion redone; area and thickness follow.",
      decision: { on: "2026-11-17", note: "Approved." },
    },
  ],
];

/** Reservoirs whose latest revision is not simply the approved one. Appended to their story. */
const openRevisions: Record<string, DemoRevision> = {
  // The mistake that a reviewer should catch: gross thickness typed as net.
  "Pellow North / Marrow sand, main": {
    on: "2026-11-27",
    state: "submitted",
    factors: { netThicknessFt: 1.62 },
    note: "Thickness updated from the PN-7 log report, table 2 (gross interval).",
  },
  "Hollin Deep / Upper Corrith sand": {
    on: "2026-11-30",
    state: "draft",
    factors: { condensateYieldStbPerMmscf: 0.98, areaAcres: 1.05 },
    note: "Fluid sample HD-2B/07 replaces the discovery sample.",
  },
  "Thornlode / Lode sand": {
    on: "2026-11-05",
    state: "returned",
    factors: { condensateRecovery: 1.35 },
    note: "Recovery for cycling, by analogy with a leaner field.",
    decision: {
      on: "2026-11-09",
      note: "The analogue holds a third of this liquid. Show why its recovery carries over, or go back to depletion.",
    },
  },
  "Sallowfleet / Fleet sand": {
    on: "2026-11-24",
    state: "draft",
    factors: { porosity: 1.03 },
    note: "Porosity from the SF-2 core, first pass.",
  },
  "Fenwhistle / Whistle sand": {
    on: "2026-11-26",
    state: "draft",
    factors: {},
    concept: "compression",
    note: "Compression brought forward; recovery under study.",
  },
};

/** Fields without an approved estimate yet. */
const firstRevisions: Record<string, DemoRevision[]> = {
  "Askerdale / Asker deep": [
    {
      on: "2026-11-19",
      state: "draft",
      factors: {},
      note: "First estimate; deep, hot and sour, one sample.",
    },
  ],
  "Hesper Reach / Reach sand": [
    {
      on: "2026-11-23",
      state: "submitted",
      factors: {},
      note: "First estimate after the discovery well.",
    },
  ],
  "Hesper Reach / Reach stringer": [
    {
      on: "2026-11-23",
      state: "submitted",
      factors: {},
      note: "First estimate after the discovery well.",
    },
  ],
};

/**
 * The revisions of one reservoir, oldest first.
 *
 * @param field      field name
 * @param reservoir  reservoir name
 * @param index      place of the reservoir in the scenario, which picks its story
 */
export function revisionsOf(field: string, reservoir: string, index: number): DemoRevision[] {
  const key = `${field} / ${reservoir}`;
  const first = firstRevisions[key];
  if (first) return first;
  const story = stories[index % stories.length];
  const open = openRevisions[key];
  return open ? [...story, open] : story;
}
