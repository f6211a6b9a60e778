import { InvalidInputError } from "../errors";
import { slugOf } from "../slugs";

/**
 * By what two names are the same one: their form in an address, so that capitals, accents and "North-East" for
 * "North East" make no second field. "" when the name has nothing that can stand in an address.
 */
export function nameKey(name: string): string {
  try {
    return slugOf(name);
  } catch (error) {
    if (error instanceof InvalidInputError) return "";
    throw error;
  }
}
