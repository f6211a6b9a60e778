import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { recombine } from "@/analytics/fluid/wellstream";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { EstimateState } from "@/models/vocabulary";
import { rangeColumns } from "./columns";
import { nameKey } from "./name-key";
import type { Problem } from "./problem";
import type { ReservoirRow, RowFieldData } from "./read-row";
import { fieldDataColumns, fieldDataKeys } from "./read-rows";

/** What the book holds now, as far as the rows of a file touch it. Keys of the maps are `nameKey`s. */
export interface Book {
  basins: Map<string, { id: string; name: string }>;
  fields: Map<string, BookField>;
}

export type FieldData = { [Key in keyof RowFieldData]: NonNullable<RowFieldData[Key]> };

export interface BookField {
  id: string;
  slug: string;
  name: string;
  version: number;
  basinName: string;
  data: FieldData;
  reservoirs: Map<string, BookReservoir>;
}

export interface BookReservoir {
  id: string;
  slug: string;
  name: string;
  version: number;
  depthFt: number | null;
  /** the open revision, else the approved one */
  latest: BookEstimate | null;
  samples: BookSample[];
}

export interface BookEstimate {
  id: string;
  revision: number;
  version: number;
  state: EstimateState;
  createdBy: string;
  createdByName: string;
  inputs: EstimateInputs;
}

export interface BookSample {
  id: string;
  version: number;
  name: string;
  sampledOn: string;
  laboratory: string;
  separatorTest: SeparatorTest;
}

/** What the person who imports may change besides estimates. */
export interface Permissions {
  actorId: string;
  mayUpdateField: boolean;
  mayUpdateCommercial: boolean;
}

export interface Change {
  what: string;
  before: string;
  after: string;
}

export type RowAction = "create" | "revise" | "unchanged" | "refused";

interface PlannedRow {
  line: number;
  basin: string;
  field: string;
  reservoir: string;
  changes: Change[];
  warnings: Problem[];
}

/** What will be done with a good row. */
export interface RowPlan extends PlannedRow {
  action: "create" | "revise" | "unchanged";
  row: ReservoirRow;
  bookField: BookField | null;
  bookReservoir: BookReservoir | null;
  /** the inputs of the revision, with what the file leaves blank taken from the book */
  inputs: EstimateInputs;
  depthFt: number | null;
  sample: "create" | "update" | "keep";
  bookSample: BookSample | null;
  estimate: "create" | "update" | "keep";
  /** what this person may change of the field and the file says differently */
  fieldChanges: Partial<FieldData>;
}

export interface RefusedPlan extends PlannedRow {
  action: "refused";
  problems: Problem[];
}

const commercial: ReadonlySet<keyof RowFieldData> = new Set([
  "workingInterest",
  "netRevenueInterest",
  "chanceOfCommerciality",
] as const);

const fieldLabels: Record<keyof RowFieldData, string> = {
  operator: "Operator",
  workingInterest: "Working interest",
  netRevenueInterest: "Net revenue interest",
  prmsClass: "Class",
  prmsSubClass: "Sub-class",
  chanceOfCommerciality: "Chance of commerciality",
};

const words = (value: string | number): string => String(value).replaceAll("_", " ");

/** Figures that went through a conversion of units and back differ in their last bits, and are the same figure. */
const RELATIVE_TOLERANCE = 1e-9;

/** Whether two parts of a record say the same, figures compared within rounding. */
export function isSame(a: unknown, b: unknown): boolean {
  if (typeof a === "number" && typeof b === "number") {
    return a === b || Math.abs(a - b) <= RELATIVE_TOLERANCE * Math.max(Math.abs(a), Math.abs(b));
  }
  if (typeof a !== "object" || typeof b !== "object" || a === null || b === null) return a === b;
  if (Array.isArray(a) || Array.isArray(b)) {
    return (
      Array.isArray(a) &&
      Array.isArray(b) &&
      a.length === b.length &&
      a.every((item, index) => isSame(item, b[index]))
    );
  }
  const [left, right] = [new Map(Object.entries(a)), new Map(Object.entries(b))];
  const keys = new Set([...left.keys(), ...right.keys()]);
  return [...keys].every((key) => isSame(left.get(key), right.get(key)));
}

const figure = (value: number): string => String(Number(value.toPrecision(6)));

const endsWords = { p90p10: "P90 and P10", p95p05: "P95 and P05" } as const;
const percentileFamilyWords = {
  normal: "normal",
  lognormal: "lognormal",
  shiftedLognormal: "shifted lognormal",
  triangular: "triangular",
  pert: "pert",
} as const;

/** A range in a few words: "1520 to 3350 acre (P90, P10)". */
function describe(distribution: Distribution, unit: string): string {
  const suffix = unit === "fraction" ? "" : ` ${unit}`;
  const span = (low: number, high: number, how: string): string =>
    `${figure(low)} to ${figure(high)}${suffix} (${how})`;
  switch (distribution.kind) {
    case "constant":
      return `${figure(distribution.value)}${suffix}`;
    case "uniform":
      return span(distribution.low, distribution.high, "uniform");
    case "triangular":
    case "pert": {
      const { low, mode, high, kind, ends = "limits" } = distribution;
      const how = ends === "limits" ? kind : `${kind}, ends at ${endsWords[ends]}`;
      return `${figure(low)}, ${figure(mode)}, ${figure(high)}${suffix} (${how})`;
    }
    case "normalP90P10":
      return span(distribution.p90, distribution.p10, "P90 to P10, normal");
    case "lognormalP90P10":
      return span(distribution.p90, distribution.p10, "P90 to P10, lognormal");
    case "normal":
      return `${figure(distribution.mean)}${suffix}, standard deviation ${figure(distribution.standardDeviation)} (normal)`;
    case "lognormal":
      return `mean of ln ${figure(distribution.mu)}, standard deviation ${figure(distribution.sigma)} (lognormal)`;
    case "percentiles": {
      const points = distribution.points.map(
        ({ exceedance, value }) => `P${figure(100 * exceedance)} ${figure(value)}`,
      );
      return `${points.join(", ")}${suffix} (${percentileFamilyWords[distribution.family]})`;
    }
    case "data": {
      const { values, shape } = distribution;
      return `${values.length} values, ${figure(Math.min(...values))} to ${figure(Math.max(...values))}${suffix} (${shape})`;
    }
    case "scenarios": {
      const cases = distribution.scenarios.map(
        ({ name, weight }) => `${name} ${figure(100 * weight)} %`,
      );
      return `${cases.length} cases: ${cases.join(", ")}`;
    }
  }
}

const unitLabels: Record<string, string> = {
  area: "acre",
  length: "ft",
  pressure: "psia",
  temperature: "degF",
  condensateYield: "STB/MMscf",
  fraction: "fraction",
};

/**
 * What the file leaves blank stays as the book has it: depth, sources, and correlations and recovery plans, which no
 * sheet can give.
 */
function withBook(row: ReservoirRow, latest: EstimateInputs | null, depthFt: number | null) {
  if (!latest) return { ...row.inputs, depthFt };
  const uncertain = { ...row.inputs.uncertain };
  for (const { input } of rangeColumns) {
    const source = uncertain[input].source || latest.uncertain[input].source;
    uncertain[input] = { ...uncertain[input], source };
  }
  const { correlations } = latest;
  const recoveryPlan = latest.recoveryPlan ?? null;
  return { ...row.inputs, uncertain, correlations, depthFt, recoveryPlan };
}

function inputChanges(before: EstimateInputs, after: EstimateInputs): Change[] {
  const changes = rangeColumns.flatMap(({ input, label, quantity }) => {
    const [old, next] = [before.uncertain[input], after.uncertain[input]];
    if (isSame(old, next)) return [];
    const sameRange = isSame(old.distribution, next.distribution);
    return [
      sameRange
        ? { what: `${label}, source`, before: old.source || "–", after: next.source || "–" }
        : {
            what: label,
            before: describe(old.distribution, unitLabels[quantity] ?? ""),
            after: describe(next.distribution, unitLabels[quantity] ?? ""),
          },
    ];
  });
  if (!isSame(before.fluid, after.fluid)) changes.push(fluidChange(before.fluid, after.fluid));
  if (!isSame(before.depthFt, after.depthFt)) {
    const depth = (value: number | null): string => (value === null ? "–" : `${figure(value)} ft`);
    changes.push({ what: "Depth", before: depth(before.depthFt), after: depth(after.depthFt) });
  }
  return changes;
}

function fluidChange(before: SeparatorTest, after: SeparatorTest): Change {
  const described = (test: SeparatorTest): string =>
    `${figure(Number(recombine(test).condensateYieldStbPerMmscf.toPrecision(4)))} STB/MMscf, ${figure(test.condensateApi)} °API`;
  return { what: "Separator test", before: described(before), after: described(after) };
}

/** Recoveries that a plan works out of the fluid do not follow the file; whoever changed them there should know. */
function unusedRecoveries(row: ReservoirRow, latest: EstimateInputs | null): Problem[] {
  const plan = latest?.recoveryPlan;
  if (!latest || !plan) return [];
  return (["gas_recovery", "condensate_recovery"] as const).flatMap((stem) => {
    const input = stem === "gas_recovery" ? "gasRecovery" : "condensateRecovery";
    const { distribution } = row.inputs.uncertain[input];
    if (isSame(distribution, latest.uncertain[input].distribution)) return [];
    return [
      {
        line: row.line,
        column: `${stem}_best`,
        value: null,
        reason: `The book works the recoveries out of the fluid (${plan.concept}); this range is kept but not used. Take the plan away on the reservoir's page to enter recoveries.`,
      },
    ];
  });
}

/** Differences of the field's own data, and which of them this person may make. */
function compareFieldData(
  row: ReservoirRow,
  field: BookField,
  may: Permissions,
): { changes: Change[]; apply: Partial<FieldData>; warnings: Problem[] } {
  const changes: Change[] = [];
  const warnings: Problem[] = [];
  const apply: Partial<Record<keyof FieldData, string | number>> = {};
  for (const key of fieldDataKeys) {
    const after = row.fieldData[key];
    const before = field.data[key];
    if (after === null || isSame(before, after)) continue;
    const allowed = commercial.has(key) ? may.mayUpdateCommercial : may.mayUpdateField;
    if (allowed) {
      apply[key] = after;
      changes.push({ what: fieldLabels[key], before: words(before), after: words(after) });
    } else {
      warnings.push({
        line: row.line,
        column: fieldDataColumns[key],
        value: String(after),
        reason: `The book has ${words(before)}, which your role may not change; it stays.`,
      });
    }
  }
  return { changes, apply: apply as Partial<FieldData>, warnings };
}

function refuse(row: ReservoirRow, problems: Problem[]): RefusedPlan {
  const { line, basin, field, reservoir, warnings } = row;
  return { action: "refused", line, basin, field, reservoir, changes: [], warnings, problems };
}

/** Why an open revision keeps this row out, or `null`. Nobody's unfinished work is overwritten by a file. */
function heldBy(latest: BookEstimate | null, actorId: string): string | null {
  if (latest?.state === "submitted") {
    return `Revision ${latest.revision} lies with a reviewer. Import again when it is decided.`;
  }
  if ((latest?.state === "draft" || latest?.state === "returned") && latest.createdBy !== actorId) {
    return `${latest.createdByName} is working on revision ${latest.revision}, which differs from this row.`;
  }
  return null;
}

/** What a new field cannot do without. */
function missingFieldData(row: ReservoirRow): Problem[] {
  return fieldDataKeys
    .filter((key) => row.fieldData[key] === null)
    .map((key) => ({
      line: row.line,
      column: fieldDataColumns[key],
      value: null,
      reason: "This field is new, so the cell is needed.",
    }));
}

function planNewReservoir(
  row: ReservoirRow,
  field: BookField | null,
  may: Permissions,
): RowPlan | RefusedPlan {
  if (!field) {
    const problems = missingFieldData(row);
    if (problems.length > 0) return refuse(row, problems);
  }
  const compared = field ? compareFieldData(row, field, may) : null;
  return {
    ...row,
    action: "create",
    row,
    bookField: field,
    bookReservoir: null,
    inputs: row.inputs,
    sample: "create",
    bookSample: null,
    estimate: "create",
    fieldChanges: compared?.apply ?? {},
    changes: compared?.changes ?? [],
    warnings: [...row.warnings, ...(compared?.warnings ?? [])],
  };
}

/**
 * What importing a row would do to the book as it stands.
 *
 * @param row  a row that is good by itself
 */
export function planRow(row: ReservoirRow, book: Book, may: Permissions): RowPlan | RefusedPlan {
  const field = book.fields.get(nameKey(row.field)) ?? null;
  if (field && nameKey(field.basinName) !== nameKey(row.basin)) {
    const reason = `The book has the field ${field.name} in the basin ${field.basinName}.`;
    return refuse(row, [{ line: row.line, column: "basin", value: row.basin, reason }]);
  }
  const reservoir = field?.reservoirs.get(nameKey(row.reservoir)) ?? null;
  if (!field || !reservoir) return planNewReservoir(row, field, may);

  const { latest } = reservoir;
  const depthFt = row.depthFt ?? reservoir.depthFt;
  const inputs = withBook(row, latest?.inputs ?? null, depthFt);
  const changes = latest
    ? inputChanges(latest.inputs, inputs)
    : [{ what: "Estimate", before: "–", after: "revision 1" }];
  const estimate = changes.length === 0 ? "keep" : opensDraft(latest) ? "create" : "update";
  if (estimate !== "keep") {
    const reason = heldBy(latest, may.actorId);
    if (reason !== null) {
      return refuse(row, [{ line: row.line, column: "reservoir", value: row.reservoir, reason }]);
    }
  }

  const bookSample =
    reservoir.samples.find(
      (sample) => sample.name.toLowerCase() === row.sample.name.toLowerCase(),
    ) ?? null;
  const sample = compareSample(row, bookSample);
  if (sample !== "keep" && estimate === "keep") {
    changes.push({
      what: "Fluid sample",
      before: bookSample ? describeSample(bookSample) : "–",
      after: describeSample(row.sample),
    });
  }
  const compared = compareFieldData(row, field, may);
  changes.push(...compared.changes);
  if (!isSame(depthFt, reservoir.depthFt) && !changes.some(({ what }) => what === "Depth")) {
    changes.push({ what: "Depth", before: "–", after: `${figure(depthFt ?? 0)} ft` });
  }
  return {
    ...row,
    action: changes.length === 0 ? "unchanged" : "revise",
    row,
    bookField: field,
    bookReservoir: reservoir,
    inputs,
    depthFt,
    sample,
    bookSample,
    estimate,
    fieldChanges: compared.apply,
    changes,
    warnings: [
      ...row.warnings,
      ...compared.warnings,
      ...unusedRecoveries(row, latest?.inputs ?? null),
    ],
  };
}

const opensDraft = (latest: BookEstimate | null): boolean =>
  latest === null || latest.state === "approved" || latest.state === "superseded";

function compareSample(row: ReservoirRow, sample: BookSample | null): RowPlan["sample"] {
  if (!sample) return "create";
  const { sampledOn, separatorTest } = row.sample;
  const laboratory = row.sample.laboratory || sample.laboratory;
  return isSame(
    { sampledOn, separatorTest, laboratory },
    {
      sampledOn: sample.sampledOn,
      separatorTest: sample.separatorTest,
      laboratory: sample.laboratory,
    },
  )
    ? "keep"
    : "update";
}

const describeSample = (sample: { name: string; sampledOn: string; laboratory: string }): string =>
  [sample.name, sample.sampledOn, sample.laboratory].filter((part) => part !== "").join(", ");
