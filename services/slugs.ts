import { InvalidInputError } from "./errors";

/**
 * The name as it appears in an address: `Ås – Øst 2` -> `as-ost-2`.
 *
 * @throws {InvalidInputError} when the name has no letter or digit that survives
 */
export function slugOf(name: string): string {
  const slug = name
    .replace(/[øØ]/g, "o")
    .replace(/[æÆ]/g, "ae")
    .replace(/ß/g, "ss")
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-+|-+$/g, "");
  if (slug === "") {
    throw new InvalidInputError([
      { pointer: "#/name", detail: "must contain a Latin letter or a digit" },
    ]);
  }
  return slug;
}
