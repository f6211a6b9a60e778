/**
 * Reads what a person types into a number field: a number, arithmetic ("12*640"), thousands separators and a unit
 * ("38 bar", "52 %"). What cannot be read is refused with a reason in words, to show under the field.
 */
import { DEGR_AT_ZERO_DEGF, quantityOf, scaleToCanonical, type QuantityName } from "./conversions";

export type ParsedQuantity =
  | {
      readonly ok: true;
      /** in the engine's unit */
      readonly value: number;
      /** symbol of the unit that was typed or assumed */
      readonly unit: string;
    }
  | { readonly ok: false; readonly reason: string };

const LONGEST_TEXT = 120;
/** Space, no-break space, thin space, narrow no-break space and apostrophes between groups of three digits. */
const GROUP_SEPARATOR = "[,'’ \\u00a0\\u2009\\u202f]";
const GROUPED = new RegExp(`[1-9]\\d{0,2}(${GROUP_SEPARATOR})\\d{3}(?:\\1\\d{3})*(?![\\d])`, "y");
const PLAIN = /(?:\d+\.?\d*|\.\d+)/y;
const DECIMALS = /\.\d+/y;
const EXPONENT = /[eE][+-]?\d+/y;

/** A reason that ends the reading; never leaves this file. */
class Unreadable extends Error {}

/** Recursive descent over + - * / ^ and brackets; usual precedence, ^ to the right. */
class Expression {
  private position = 0;
  private depth = 0;

  constructor(private readonly text: string) {}

  evaluate(): number {
    const value = this.sum();
    this.skipSpaces();
    if (this.position < this.text.length) throw this.unexpected();
    if (!Number.isFinite(value)) throw new Unreadable("The result is too large to be a number.");
    return value;
  }

  private sum(): number {
    let value = this.product();
    for (;;) {
      if (this.take("+")) value += this.product();
      else if (this.take("-−")) value -= this.product();
      else return value;
    }
  }

  private product(): number {
    let value = this.signed();
    for (;;) {
      if (this.take("*×·")) value *= this.signed();
      else if (this.take("/÷")) {
        const divisor = this.signed();
        if (divisor === 0) throw new Unreadable("This divides by zero.");
        value /= divisor;
      } else return value;
    }
  }

  private signed(): number {
    this.depth += 1;
    if (this.depth > 50) throw new Unreadable("There are too many brackets or signs.");
    const value = this.take("-−") ? -this.signed() : this.take("+") ? this.signed() : this.power();
    this.depth -= 1;
    return value;
  }

  private power(): number {
    const base = this.primary();
    if (!this.take("^")) return base;
    const value = base ** this.signed();
    if (Number.isNaN(value)) throw new Unreadable("This power has no value.");
    return value;
  }

  private primary(): number {
    if (this.take("(")) {
      const value = this.sum();
      if (!this.take(")")) throw new Unreadable("A bracket is not closed.");
      return value;
    }
    return this.number();
  }

  private number(): number {
    this.skipSpaces();
    const whole = this.match(GROUPED) ?? this.match(PLAIN);
    if (whole === null) throw this.unexpected();
    const decimals = whole.includes(".") ? "" : (this.match(DECIMALS) ?? "");
    const exponent = this.match(EXPONENT) ?? "";
    if (/^,\d/.test(this.text.slice(this.position))) {
      throw new Unreadable(
        "A comma separates thousands, in groups of three digits. Use a point for decimals.",
      );
    }
    return Number(whole.replace(new RegExp(GROUP_SEPARATOR, "g"), "") + decimals + exponent);
  }

  private match(pattern: RegExp): string | null {
    pattern.lastIndex = this.position;
    const found = pattern.exec(this.text);
    if (!found) return null;
    this.position = pattern.lastIndex;
    return found[0];
  }

  private take(symbols: string): boolean {
    this.skipSpaces();
    const symbol = this.text[this.position];
    if (symbol === undefined || !symbols.includes(symbol)) return false;
    this.position += 1;
    return true;
  }

  private skipSpaces(): void {
    while (/\s/.test(this.text[this.position] ?? "")) this.position += 1;
  }

  private unexpected(): Unreadable {
    const rest = this.text.slice(this.position).trim();
    return new Unreadable(
      rest === "" ? "A number is missing at the end." : `“${rest}” is not a number.`,
    );
  }
}

/** "a pressure" without its article. */
const plain = (noun: string) => noun.replace(/^an? /, "");

const fold = (text: string) => text.toLowerCase().replace(/\s+/g, "");

interface Suffix {
  readonly symbol: string;
  readonly expression: string;
}

/** The longest unit of the quantity at the end of the text; its spelling may hold spaces, digits and slashes. */
function splitUnit(text: string, quantity: QuantityName): Suffix | null {
  const spellings = Object.entries(quantityOf(quantity).units)
    .flatMap(([symbol, unit]) =>
      [symbol, ...(unit.aliases ?? [])].map((spelling) => ({ symbol, folded: fold(spelling) })),
    )
    .sort((a, b) => b.folded.length - a.folded.length);
  for (const { symbol, folded } of spellings) {
    // Walk back over as many non-space characters as the spelling has.
    let start = text.length;
    for (let left = folded.length; left > 0 && start > 0; ) {
      start -= 1;
      if (!/\s/.test(text[start])) left -= 1;
    }
    const expression = text.slice(0, start);
    const beginsWithDigit = /\d/.test(folded[0]);
    // "21e6 Sm3" must not be read as 2 x "1e6 Sm3", nor "a km" as "m": a number, bracket or space comes before.
    const allowed = beginsWithDigit ? /[\s)]$/ : /[\d.)\s]$/;
    if (fold(text.slice(start)) === folded && allowed.test(expression)) {
      return { symbol, expression };
    }
  }
  return null;
}

function explainLetters(text: string, quantity: QuantityName): string | null {
  const letters = /(?<![\d.])[a-zµ°%‰][^()*+]*$|(?<=[\d.)])[a-df-zµ°%‰][^()*+]*$/i.exec(text)?.[0];
  if (!letters) return null;
  const { noun, units } = quantityOf(quantity);
  if (quantity === "pressure" && /^(psig|barg|kpag|mpag|psi\s*g)$/i.test(letters.trim())) {
    return "This is a gauge pressure. Enter an absolute one: add the atmospheric pressure, about 14.7 psi or 1.01 bar.";
  }
  return `“${letters.trim()}” is not a unit of ${plain(noun)} here; use ${Object.keys(units).join(", ")}.`;
}

/**
 * Reads a text as a quantity.
 *
 * The unit at the end applies to the whole expression: "2 * 19 bar" is 38 bar. Case and spaces in units do not
 * matter. Without a unit, `defaultUnit` is assumed (the one the field shows). Signs, brackets, + - * / ^ and
 * "1.2e9" are read; a comma separates thousands and is never a decimal comma.
 *
 * @param defaultUnit  symbol of a unit of the quantity; the canonical one unless given
 * @returns  the value in the engine's unit, or the reason why the text cannot be read
 * @example parseQuantity("12*640", "area") // => { ok: true, value: 7680, unit: "acre" }
 * @example parseQuantity("52 %", "fraction") // => { ok: true, value: 0.52, unit: "%" }
 */
export function parseQuantity(
  text: string,
  quantity: QuantityName,
  defaultUnit?: string,
): ParsedQuantity {
  const { noun, minimum, units } = quantityOf(quantity);
  const trimmed = text.trim();
  if (trimmed === "") return { ok: false, reason: `Enter ${noun}.` };
  if (trimmed.length > LONGEST_TEXT) {
    return { ok: false, reason: `This is longer than ${LONGEST_TEXT} characters.` };
  }
  const suffix = splitUnit(trimmed, quantity);
  const symbol = suffix?.symbol ?? defaultUnit ?? Object.keys(units)[0];
  const unit = Object.hasOwn(units, symbol) ? units[symbol] : undefined;
  if (!unit) return { ok: false, reason: `“${symbol}” is not a unit of ${plain(noun)}.` };

  let typed: number;
  try {
    typed = new Expression(suffix?.expression ?? trimmed).evaluate();
  } catch (error) {
    if (!(error instanceof Unreadable)) throw error;
    return {
      ok: false,
      reason: (suffix ? null : explainLetters(trimmed, quantity)) ?? error.message,
    };
  }
  const value = scaleToCanonical(typed, unit);
  if (!Number.isFinite(value)) {
    return { ok: false, reason: "The result is too large to be a number." };
  }
  if (minimum !== undefined && value < minimum) {
    return {
      ok: false,
      reason:
        minimum === -DEGR_AT_ZERO_DEGF
          ? "This is below absolute zero."
          : `${noun[0].toUpperCase()}${noun.slice(1)} cannot be negative.`,
    };
  }
  return { ok: true, value, unit: symbol };
}
