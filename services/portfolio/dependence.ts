import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import { findDefaultDependenceSet, findDependenceSet } from "@/models/queries/dependence-sets";
import { NotFoundError } from "../errors";
import type { PortfolioBasis } from "./basis";

/** The set that a basis comes to. */
export interface ChosenDependence {
  id: string;
  name: string;
  isDefault: boolean;
  dependence: Dependence;
}

/** @throws {NotFoundError} when there is no such set */
export async function findChosenDependence({
  dependence: wanted,
}: Pick<PortfolioBasis, "dependence">): Promise<ChosenDependence> {
  const set =
    wanted === "default" ? await findDefaultDependenceSet() : await findDependenceSet(wanted);
  if (!set) throw new NotFoundError("dependence set");
  const { id, name, isDefault, dependence } = set;
  return { id, name, isDefault, dependence };
}

/** What answers say of it. */
export const describeDependence = ({ id, name, isDefault }: ChosenDependence) => ({
  id,
  name,
  isDefault,
});
