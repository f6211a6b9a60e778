import { isDeepStrictEqual } from "node:util";
import { noStudy, type SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { recombine } from "@/analytics/fluid/wellstream";
import type { FluidSample } from "@/models/fluid-sample";
import { createFluidSampleRow, findFluidSample } from "@/models/queries/fluid-samples";
import { findReservoir } from "@/models/queries/reservoirs";
import { changesBetween, recordAudit } from "./audit";
import { now, today } from "./clock";
import { InvalidInputError, NotFoundError, refuseImpossible } from "./errors";
import { authorise, type Actor } from "./policy";
import { assertPossibleStudy, studyAfter } from "./sample-studies";
import { inTransaction } from "./transaction";
import { assertVersion, saveVersioned } from "./versions";

export interface NewFluidSample {
  reservoirId: string;
  name: string;
  /** `YYYY-MM-DD`, not in the future */
  sampledOn: string;
  laboratory?: string;
  separatorTest: SeparatorTest;
  /** what else the laboratory found, and what was made of it; nothing else unless given */
  study?: SampleStudy;
}

/**
 * What people filter and compare samples by, from recombining the separator streams.
 *
 * @throws {InvalidInputError} when the sheet cannot be a gas condensate's
 */
function keyFigures(test: SeparatorTest) {
  const wellstream = refuseImpossible("separatorTest", () => recombine(test));
  return {
    separatorTest: test,
    condensateApi: test.condensateApi,
    gasOilRatioScfPerStb: wellstream.surfaceGasOilRatioScfPerStb,
    condensateYieldStbPerMmscf: wellstream.condensateYieldStbPerMmscf,
    wellstreamGravity: wellstream.wellstreamGravity,
    hydrogenSulphide: test.hydrogenSulphide,
    dewPointPsia: test.dewPointPsia,
  };
}

function assertNotAhead(sampledOn: string | undefined): void {
  if (sampledOn !== undefined && sampledOn > today()) {
    throw new InvalidInputError([{ pointer: "#/sampledOn", detail: "lies in the future" }]);
  }
}

export async function getFluidSample(actor: Actor, id: string): Promise<FluidSample> {
  authorise(actor, "fluidSample.read");
  const sample = await findFluidSample(id);
  if (!sample) throw new NotFoundError("fluid sample");
  return sample;
}

export async function createFluidSample(actor: Actor, input: NewFluidSample): Promise<FluidSample> {
  authorise(actor, "fluidSample.create");
  assertNotAhead(input.sampledOn);
  const study = input.study ?? noStudy;
  assertPossibleStudy(study);
  const values = {
    reservoirId: input.reservoirId,
    name: input.name.trim(),
    sampledOn: input.sampledOn,
    laboratory: input.laboratory ?? "",
    ...keyFigures(input.separatorTest),
    study,
  };
  return inTransaction(async (transaction) => {
    if (!(await findReservoir(input.reservoirId, { transaction }))) {
      throw new InvalidInputError([
        { pointer: "#/reservoirId", detail: "There is no such reservoir." },
      ]);
    }
    const at = now();
    const sample = await createFluidSampleRow(
      { ...values, createdAt: at, updatedAt: at },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: "fluidSample.created",
        entity: "fluidSample",
        entityId: sample.id,
        after: values,
      },
      transaction,
    );
    return sample;
  });
}

/** Change a sample. Estimates keep the copy of the sheet they were made with. */
export async function updateFluidSample(
  actor: Actor,
  id: string,
  patch: Partial<Omit<NewFluidSample, "reservoirId">>,
  expectedVersion: number,
): Promise<FluidSample> {
  authorise(actor, "fluidSample.update");
  assertNotAhead(patch.sampledOn);
  const { separatorTest, study, ...plain } = patch;
  if (study) assertPossibleStudy(study);
  return inTransaction(async (transaction) => {
    const sample = await findFluidSample(id, { transaction, lock: true });
    if (!sample) throw new NotFoundError("fluid sample");
    assertVersion(sample, expectedVersion);
    const changes = changesBetween<Omit<NewFluidSample, "reservoirId">>(
      sample.get({ plain: true }),
      {
        ...plain,
        name: patch.name?.trim(),
        separatorTest,
        study: studyAfter(sample.study, {
          study,
          changesSeparatorTest:
            separatorTest !== undefined && !isDeepStrictEqual(separatorTest, sample.separatorTest),
        }),
      },
    );
    sample.set({ ...changes.after, ...(separatorTest && keyFigures(separatorTest)) });
    await saveVersioned(sample, transaction);
    await recordAudit(
      { actor, action: "fluidSample.updated", entity: "fluidSample", entityId: id, ...changes },
      transaction,
    );
    return sample;
  });
}
