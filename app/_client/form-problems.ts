import type { FieldValues, Path, UseFormSetError } from "react-hook-form";
import { errorWords, ProblemError } from "./request";

/**
 * Puts what the server says about single fields at those fields of a form.
 *
 * @param fields  names of the form's fields, as the request's body has them
 * @returns       what belongs to no field, for a notice; null when every message found its place
 */
export function placeProblems<Values extends FieldValues>(
  error: unknown,
  setError: UseFormSetError<Values>,
  fields: readonly Path<Values>[],
): string | null {
  if (!(error instanceof ProblemError)) return errorWords(error);
  const placed = error.errors.filter(({ pointer, detail }) => {
    const field = fields.find((name) => pointer === `#/${name.split(".").join("/")}`);
    if (field) setError(field, { message: sentence(detail) }, { shouldFocus: true });
    return field !== undefined;
  });
  if (placed.length > 0 && placed.length === error.errors.length) return null;
  return errorWords(error);
}

/** "must not be empty" -> "Must not be empty." */
export function sentence(text: string): string {
  const capital = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(capital) ? capital : `${capital}.`;
}
