import type { Reservoir } from "@/models/reservoir";
import type { Actor } from "@/services/policy";
import type { ReservoirFile } from "@/services/reservoirs";
import { presentEstimateBody, presentEstimateRow } from "../estimates/presenter";
import { presentField } from "../fields/presenter";
import { presentFluidSample } from "../fluid-samples/presenter";
import type { ReservoirFileView, ReservoirView } from "./schema";

/** @param reservoir  loaded with its field */
export function presentReservoir(reservoir: Reservoir): ReservoirView {
  if (!reservoir.field) throw new Error("the reservoir was loaded without its field");
  const { id, slug, name, depthFt, version } = reservoir;
  return { id, slug, name, depthFt, field: presentField(reservoir.field), version };
}

export function presentReservoirFile(file: ReservoirFile, actor: Actor): ReservoirFileView {
  return {
    ...presentReservoir(file.reservoir),
    approved: file.approved && presentEstimateBody(file.approved, actor),
    open: file.open && presentEstimateBody(file.open, actor),
    history: file.history.map((estimate) => presentEstimateRow(estimate, actor)),
    fluidSamples: file.fluidSamples.map(presentFluidSample),
  };
}
