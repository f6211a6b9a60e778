import type { Field } from "@/models/field";
import { presentPerson } from "../common-presenter";
import type { FieldView } from "./schema";

/** @param field  loaded with its basin and responsible engineer */
export function presentField(field: Field): FieldView {
  if (!field.basin) throw new Error("the field was loaded without its basin");
  return {
    id: field.id,
    slug: field.slug,
    name: field.name,
    basin: { id: field.basin.id, slug: field.basin.slug, name: field.basin.name },
    operator: field.operator,
    latitude: field.latitude,
    longitude: field.longitude,
    waterDepthFt: field.waterDepthFt,
    workingInterest: field.workingInterest,
    netRevenueInterest: field.netRevenueInterest,
    prmsClass: field.prmsClass,
    prmsSubClass: field.prmsSubClass,
    chanceOfCommerciality: field.chanceOfCommerciality,
    responsibleEngineer: presentPerson(field.responsibleEngineer),
    notes: field.notes,
    version: field.version,
  };
}
