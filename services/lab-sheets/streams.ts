import {
  reportedStreamSchema,
  type LightComponent,
  type ReportedStream,
} from "@/analytics/composition/composition-schema";
import type { CsvRecord } from "../csv-records";
import { componentOf, type NamedComponent } from "./component-names";
import type { SheetReader } from "./sheet-reader";

/** A component's amount with the cell it comes from. */
interface Amount {
  record: CsvRecord;
  index: number;
  value: number;
}

export interface PlusProperties {
  molecularWeight: number | null;
  specificGravity: number | null;
}

/** Where a component's amount belongs in a reported stream: a single carbon number under its own number. */
export function placeOfComponent(component: NamedComponent): string {
  if (component.kind === "light") return `light.${component.name}`;
  return component.kind === "carbonNumber"
    ? `carbonNumbers.${component.carbonNumber}`
    : "plus.molePercent";
}

/**
 * The amounts of one stream, gathered cell by cell; whether they are per cent or fractions is known when all are there.
 */
export class StreamAmounts {
  readonly light = new Map<LightComponent, Amount>();
  readonly heavy = new Map<number, Amount>();
  plus: { carbonNumber: number; amount: Amount } | null = null;
  readonly properties: PlusProperties = { molecularWeight: null, specificGravity: null };
  stated: { total: Amount } | null = null;

  /** @param what  the stream in words: "the separator gas" */
  constructor(
    private readonly reader: SheetReader,
    readonly what: string,
  ) {}

  get isEmpty(): boolean {
    return this.count === 0;
  }

  get count(): number {
    return this.light.size + this.heavy.size + (this.plus ? 1 : 0);
  }

  get total(): number {
    return this.amounts.reduce((sum, { value }) => sum + value, 0);
  }

  private get amounts(): Amount[] {
    return [
      ...this.light.values(),
      ...this.heavy.values(),
      ...(this.plus ? [this.plus.amount] : []),
    ];
  }

  add(component: NamedComponent, amount: Amount): void {
    const { record, index, value } = amount;
    const again = () =>
      this.reader.problem(
        record.line,
        index,
        record.cells[index],
        `This component is there twice in ${this.what}; the first figure was kept.`,
      );
    if (component.kind === "total") this.stated = { total: amount };
    else if (component.kind === "unknown") {
      if (value === 0) return;
      this.reader.problem(
        record.line,
        index,
        record.cells[index],
        `${component.reason} Left out of ${this.what}.`,
      );
    } else if (component.kind === "light") {
      if (this.light.has(component.name)) again();
      else this.light.set(component.name, amount);
    } else if (component.kind === "carbonNumber") {
      if (this.heavy.has(component.carbonNumber)) again();
      else this.heavy.set(component.carbonNumber, amount);
    } else if (this.plus) again();
    else this.plus = { carbonNumber: component.carbonNumber, amount };
  }

  /**
   * The stream in mole per cent, or null when it cannot be one; then the problems say why.
   *
   * @param scale  what brings the figures to per cent; null lets their sum decide, which is said
   */
  finish(scale: number | null): ReportedStream | null {
    const factor = scale ?? this.scaleOfSum();
    const percent = ({ value }: Amount) => value * factor;
    for (const amount of this.amounts) {
      if (percent(amount) >= 0 && percent(amount) <= 100) continue;
      this.reader.problem(
        amount.record.line,
        amount.index,
        amount.record.cells[amount.index],
        `A mole per cent is 0 to 100. ${capitalised(this.what)} was not read.`,
      );
      return null;
    }
    this.compareTotal(factor);
    const plus = this.plusFraction(factor);
    if (plus === undefined) return null;
    const parsed = reportedStreamSchema.safeParse({
      light: Object.fromEntries([...this.light].map(([name, amount]) => [name, percent(amount)])),
      carbonNumbers: [...this.heavy]
        .sort(([a], [b]) => a - b)
        .map(([carbonNumber, amount]) => ({ carbonNumber, molePercent: percent(amount) })),
      plus,
    });
    return parsed.success ? parsed.data : null;
  }

  /** Without a unit the sum tells per cent from fractions; a sum that is neither is taken for per cent, and said. */
  private scaleOfSum(): number {
    const { total } = this;
    const isFraction = Math.abs(total - 1) <= 0.1;
    const isPercent = Math.abs(total - 100) <= 10;
    const first = this.amounts[0];
    if (isFraction || isPercent) {
      this.reader.note(
        `${capitalised(this.what)} adds up to ${figure(total)} and was read as ${isFraction ? "mole fractions" : "mole per cent"}.`,
      );
    } else {
      this.reader.problem(
        first.record.line,
        first.index,
        figure(total),
        `${capitalised(this.what)} has no unit and adds up to ${figure(total)}, neither 1 nor 100. It was read as mole per cent.`,
      );
    }
    return isFraction ? 100 : 1;
  }

  private compareTotal(factor: number): void {
    if (!this.stated) return;
    const { total } = this.stated;
    const read = this.total * factor;
    const printed = total.value * factor;
    if (Math.abs(read - printed) <= 0.05) return;
    this.reader.problem(
      total.record.line,
      total.index,
      total.record.cells[total.index],
      `The sheet's total is ${figure(printed)} %, what was read of ${this.what} adds up to ${figure(read)} %. The total was left out.`,
    );
  }

  /** `null` for a stream without a plus fraction, `undefined` when what it needs is missing. */
  private plusFraction(factor: number): ReportedStream["plus"] | undefined {
    if (!this.plus || this.plus.amount.value === 0) return null;
    const { carbonNumber, amount } = this.plus;
    const { molecularWeight, specificGravity } = this.properties;
    if (
      molecularWeight !== null &&
      molecularWeight > 0 &&
      specificGravity !== null &&
      specificGravity > 0
    ) {
      return { carbonNumber, molePercent: amount.value * factor, molecularWeight, specificGravity };
    }
    const missing = [
      ...(molecularWeight === null ? ["molecular weight"] : []),
      ...(specificGravity === null ? ["specific gravity"] : []),
    ];
    this.reader.problem(
      amount.record.line,
      amount.index,
      amount.record.cells[amount.index],
      `C${carbonNumber}+ needs a ${missing.join(" and a ") || "positive molecular weight and specific gravity"}. ${capitalised(this.what)} was not read.`,
    );
    return undefined;
  }
}

/** Finds the component of a name; a name that is none is a problem of its line. */
export function componentAt(
  reader: SheetReader,
  record: CsvRecord,
  index: number,
  name: string,
): NamedComponent | null {
  const component = componentOf(name);
  if (!component) {
    reader.problem(
      record.line,
      index,
      record.cells[index],
      "This is the name of no component, column or line that is read here. Left out.",
    );
  }
  return component;
}

export const capitalised = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

/** A figure as sentences write it. */
export const figure = (value: number) => String(Number(value.toPrecision(6)));
