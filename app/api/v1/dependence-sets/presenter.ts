import type { DependenceSet } from "@/models/dependence-set";
import { presentMoment, presentPerson } from "../common-presenter";
import type { DependenceSetView } from "./schema";

/** @param set  loaded with whoever changed it last */
export function presentDependenceSet(set: DependenceSet): DependenceSetView {
  const { id, name, note, isDefault, dependence, updatedAt, updater, version } = set;
  return {
    id,
    name,
    note,
    isDefault,
    dependence,
    updatedAt: presentMoment(updatedAt),
    updatedBy: presentPerson(updater),
    version,
  };
}
