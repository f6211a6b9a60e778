import { readComposition } from "@/analytics/composition/read-sheet";
import { isAdjusted } from "@/analytics/equation-of-state/characterisation-schema";
import type { SampleStudy } from "@/analytics/fluid/sample-study-schema";
import { InvalidInputError, refuseImpossible, type InputProblem } from "./errors";

/**
 * A study whose parts cannot belong together, or a composition that no fluid can have, is refused. What a depletion
 * table says about itself is judged by its checks, not here: a flawed table is kept as the laboratory wrote it, with its
 * findings beside it.
 *
 * @throws {InvalidInputError} with pointers under `#/study`
 */
export function assertPossibleStudy(study: SampleStudy): void {
  const problems: InputProblem[] = [];
  if (study.characterisation !== null && study.composition === null) {
    problems.push({
      pointer: "#/study/characterisation",
      detail: "needs the composition that it is a characterisation of",
    });
  }
  if (study.tuning !== null && study.characterisation === null) {
    problems.push({
      pointer: "#/study/tuning",
      detail: "needs the characterisation that was tuned",
    });
  }
  if (study.tuning === null && study.characterisation && isAdjusted(study.characterisation)) {
    problems.push({
      pointer: "#/study/tuning",
      detail: "needs to say what the adjustments of the characterisation were fitted to",
    });
  }
  if (study.separatorTestOrigin === "computed" && study.composition === null) {
    problems.push({
      pointer: "#/study/separatorTestOrigin",
      detail: "can be computed only where there is a composition to compute it from",
    });
  }
  if (problems.length > 0) throw new InvalidInputError(problems);
  const { composition } = study;
  if (composition) refuseImpossible("study.composition", () => readComposition(composition));
}

/**
 * The study after a change of the sample. A separator sheet that is typed over is no longer the computed one, unless
 * the same change says that it is.
 */
export function studyAfter(
  before: SampleStudy,
  change: { study?: SampleStudy; changesSeparatorTest: boolean },
): SampleStudy {
  if (change.study) return change.study;
  return change.changesSeparatorTest && before.separatorTestOrigin === "computed"
    ? { ...before, separatorTestOrigin: "measured" }
    : before;
}
