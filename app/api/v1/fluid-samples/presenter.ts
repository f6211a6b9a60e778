import type { FluidSample } from "@/models/fluid-sample";
import type { FluidSampleView } from "./schema";

export function presentFluidSample(sample: FluidSample): FluidSampleView {
  return {
    id: sample.id,
    reservoirId: sample.reservoirId,
    name: sample.name,
    sampledOn: sample.sampledOn,
    laboratory: sample.laboratory,
    separatorTest: sample.separatorTest,
    condensateApi: sample.condensateApi,
    gasOilRatioScfPerStb: sample.gasOilRatioScfPerStb,
    condensateYieldStbPerMmscf: sample.condensateYieldStbPerMmscf,
    wellstreamGravity: sample.wellstreamGravity,
    hydrogenSulphide: sample.hydrogenSulphide,
    dewPointPsia: sample.dewPointPsia,
    study: sample.study,
    version: sample.version,
  };
}
