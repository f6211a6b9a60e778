/** A whole fluid sample as it stands in its fields, beside the separator test and the study that it reads as. */
import type { SeparatorStage } from "@/analytics/composition/composition-schema";
import {
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { noStudy, type SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import {
  emptySheet,
  readSheet,
  textOfTest,
  type SheetReading,
  type SheetText,
} from "@/components/estimate/sheet-text";
import {
  emptyComposition,
  readCompositionText,
  textOfComposition,
  type CompositionReading,
  type CompositionText,
} from "./composition-text";
import {
  readDepletion,
  textOfDepletion,
  type DepletionReading,
  type DepletionText,
} from "./depletion-text";
import {
  readStages,
  stagesOfTest,
  textOfStages,
  usualStages,
  type StagesReading,
  type StagesText,
} from "./stages-text";

export interface SampleText {
  name: string;
  sampledOn: string;
  laboratory: string;
  separator: SheetText;
  /** `computed`: the separator test is worked out from the composition and the stages */
  origin: SampleStudy["separatorTestOrigin"];
  composition: CompositionText;
  /** `null`: the separators of the test */
  stages: StagesText | null;
  /** `null`: there is none */
  depletion: DepletionText | null;
  /** `null` while nobody has accepted one: the usual one is computed with, untuned */
  characterisation: Characterisation | null;
  tuning: SampleStudy["tuning"];
}

/** What a composition is computed with until somebody chooses otherwise. */
export const usualCharacterisation: Characterisation = {
  split: { kind: "gamma", fractions: 3, shape: 1 },
  criticals: "keslerLee",
  adjustments: untouched,
};

export interface StoredSample {
  name: string;
  sampledOn: string;
  laboratory: string;
  separatorTest: SeparatorTest;
  study: SampleStudy;
}

export function textOfSample(sample: StoredSample): SampleText {
  const { study } = sample;
  return {
    name: sample.name,
    sampledOn: sample.sampledOn,
    laboratory: sample.laboratory,
    separator: textOfTest(sample.separatorTest),
    origin: study.separatorTestOrigin,
    composition: study.composition ? textOfComposition(study.composition) : emptyComposition(),
    stages: study.stages && textOfStages(study.stages),
    depletion: study.depletion && textOfDepletion(study.depletion),
    characterisation: study.characterisation,
    tuning: study.tuning,
  };
}

/** A sample to fill in, from a separator test where there is one. */
export const newSampleText = (test: SeparatorTest | null): SampleText => ({
  ...textOfSample({
    name: "",
    sampledOn: "",
    laboratory: "",
    separatorTest: test ?? placeholder,
    study: noStudy,
  }),
  ...(test === null && { separator: emptySheet() }),
});

/** Only to shape an empty sample: its figures are replaced at once. */
const placeholder: SeparatorTest = {
  basePressurePsia: 14.696,
  primarySeparator: {
    pressurePsia: 14.696,
    temperatureDegF: 60,
    gasOilRatioScfPerStb: 1,
    gasGravity: 1,
  },
  secondSeparator: null,
  stockTankGas: null,
  condensateApi: 0,
  condensateMolecularWeight: null,
  nitrogen: 0,
  carbonDioxide: 0,
  hydrogenSulphide: 0,
  dewPointPsia: null,
};

export interface SampleReading {
  separator: SheetReading;
  composition: CompositionReading;
  stagesReading: StagesReading | null;
  depletion: DepletionReading | null;
  /** of the sheet, of the separator test, or the usual ones; `null` while the sheet is unfinished */
  stages: SeparatorStage[] | null;
  /** nobody has given separators: the usual ones are computed with */
  isStagesAssumed: boolean;
  characterisation: Characterisation;
  /** `null` while a part that was begun is missing something or cannot be read */
  study: SampleStudy | null;
  /** parts that stand in the way of saving, in words */
  unfinished: readonly string[];
}

/** Reads everything. A part that is empty is not there; one that was begun must be readable to be kept. */
export function readSample(text: SampleText): SampleReading {
  const separator = readSheet(text.separator);
  const composition = readCompositionText(text.composition);
  const stagesReading = text.stages && readStages(text.stages);
  const depletion = text.depletion && readDepletion(text.depletion);
  const ofTest = separator.test && text.origin === "measured" ? stagesOfTest(separator.test) : null;
  const isStagesAssumed = stagesReading === null && ofTest === null && !composition.isEmpty;
  const given = stagesReading !== null ? stagesReading.stages : ofTest;
  const stages = isStagesAssumed ? [...usualStages] : given;
  const hasDepletion = depletion !== null && !depletion.isEmpty;
  const unfinished = [
    text.origin === "measured" && !separator.test && "the separator test",
    !composition.isEmpty && !composition.sheet && "the composition",
    stagesReading !== null && !stagesReading.stages && "the separators",
    hasDepletion && !depletion.table && "the depletion table",
  ].filter((part) => part !== false);
  return {
    separator,
    composition,
    stagesReading,
    depletion,
    stages,
    isStagesAssumed,
    characterisation: text.characterisation ?? usualCharacterisation,
    unfinished,
    study:
      unfinished.length > 0
        ? null
        : {
            composition: composition.sheet,
            depletion: hasDepletion ? depletion.table : null,
            // A separator test that was worked out keeps the separators that it rests on.
            stages: stagesReading
              ? stagesReading.stages
              : text.origin === "computed"
                ? stages
                : null,
            characterisation: text.characterisation,
            tuning: text.tuning,
            separatorTestOrigin: text.origin,
          },
  };
}
