import type { StoredSample } from "./sample-text";

/** Parts of a sample that two people may have changed. */
export const samplePartWords = {
  name: "Name",
  sampledOn: "Sampled on",
  laboratory: "Laboratory",
  separatorTest: "Separator test",
  composition: "Composition",
  stages: "Separators",
  depletion: "Depletion table",
  equationOfState: "Equation of state",
} as const;
export type SamplePart = keyof typeof samplePartWords;
export const sampleParts = Object.keys(samplePartWords) as SamplePart[];

/** JSON with sorted keys: the order in which a database gives them back means nothing. */
export const canonical = (value: unknown): string =>
  JSON.stringify(value, (_, inner: unknown) =>
    inner !== null && typeof inner === "object" && !Array.isArray(inner)
      ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)))
      : inner,
  );

function partOf(sample: StoredSample, part: SamplePart): unknown {
  const { study } = sample;
  if (part === "separatorTest") return [sample.separatorTest, study.separatorTestOrigin];
  if (part === "equationOfState") return [study.characterisation, study.tuning];
  if (part === "composition" || part === "stages" || part === "depletion") return study[part];
  return sample[part];
}

export const differingParts = (mine: StoredSample, theirs: StoredSample): SamplePart[] =>
  sampleParts.filter((part) => canonical(partOf(mine, part)) !== canonical(partOf(theirs, part)));

/** Mine, with the chosen parts of theirs. */
export function mergeSamples(
  mine: StoredSample,
  theirs: StoredSample,
  fromTheirs: readonly SamplePart[],
): StoredSample {
  const of = (part: SamplePart) => (fromTheirs.includes(part) ? theirs : mine);
  return {
    name: of("name").name,
    sampledOn: of("sampledOn").sampledOn,
    laboratory: of("laboratory").laboratory,
    separatorTest: of("separatorTest").separatorTest,
    study: {
      separatorTestOrigin: of("separatorTest").study.separatorTestOrigin,
      composition: of("composition").study.composition,
      stages: of("stages").study.stages,
      depletion: of("depletion").study.depletion,
      characterisation: of("equationOfState").study.characterisation,
      tuning: of("equationOfState").study.tuning,
    },
  };
}
