import type { z } from "zod";

const numbers = new Intl.NumberFormat("en-GB", { maximumSignificantDigits: 12 });

const kinds: Record<string, string> = {
  string: "a text",
  number: "a number",
  int: "a whole number",
  boolean: "true or false",
  array: "a list",
  tuple: "a list",
  object: "an object",
  record: "an object",
  date: "a date",
  null: "null",
};

const formats: Record<string, string> = {
  uuid: "an id",
  email: "an e-mail address",
  url: "a web address",
  date: "a date such as 2026-10-13",
  datetime: "a date and time such as 2026-10-13T08:30:00Z",
};

const counted: Record<string, [one: string, many: string]> = {
  string: ["character", "characters"],
  array: ["entry", "entries"],
  set: ["entry", "entries"],
};

/**
 * What is wrong with one part of a request, as the end of a sentence that begins with the part's name: "must be at most
 * 90". A message that a schema gives itself goes before these.
 */
export function inputWords(issue: z.core.$ZodRawIssue): string {
  switch (issue.code) {
    case "invalid_type":
      if (issue.input === undefined) return "is missing";
      return `must be ${kinds[issue.expected] ?? "of another kind"}`;
    case "too_big":
      return boundWords(issue.origin, issue.inclusive ? "at most" : "less than", issue.maximum);
    case "too_small":
      if (issue.minimum === 1 && issue.origin in counted) return "must not be empty";
      return boundWords(issue.origin, issue.inclusive ? "at least" : "more than", issue.minimum);
    case "invalid_value":
      if (issue.input === undefined) return "is missing";
      return `must be ${choiceOf(issue.values)}`;
    case "invalid_union":
      if (issue.input === undefined) return "is missing";
      return Array.isArray(issue.options)
        ? `must be ${choiceOf(issue.options)}`
        : unionWords(issue);
    case "invalid_format":
      return formats[issue.format]
        ? `must be ${formats[issue.format]}`
        : "is not written as it must be";
    case "not_multiple_of":
      return `must be a multiple of ${numbers.format(Number(issue.divisor))}`;
    case "unrecognized_keys":
      return `must not have ${issue.keys.map((key) => `“${key}”`).join(", ")}`;
    default:
      return "cannot be used";
  }
}

function boundWords(origin: string, comparison: string, bound: number | bigint): string {
  const figure = numbers.format(bound);
  if (!(origin in counted)) return `must be ${comparison} ${figure}`;
  const [one, many] = counted[origin];
  return `must have ${comparison} ${figure} ${Number(bound) === 1 ? one : many}`;
}

function choiceOf(values: readonly unknown[]): string {
  return values.length === 1 ? `${values[0]}` : `one of ${values.join(", ")}`;
}

/** Says every kind that would do, when each alternative failed by its kind alone. */
function unionWords(issue: z.core.$ZodRawIssue<z.core.$ZodIssueInvalidUnion>): string {
  const expected = (issue.errors ?? []).map(([first]) =>
    first?.code === "invalid_type" && first.path.length === 0 ? kinds[first.expected] : undefined,
  );
  return expected.length > 0 && expected.every((kind) => kind !== undefined)
    ? `must be ${expected.join(" or ")}`
    : "has none of the forms it may have";
}
