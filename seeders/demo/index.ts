/**
 * The demo: an invented operator's book with two years of history. It goes through the services that real work goes
 * through, under the names of its people and at the times of its story, so that it obeys every rule they hold.
 */
import { approveEstimate, returnEstimate, submitEstimate } from "@/services/estimate-review";
import { runEstimate } from "@/services/estimate-runs";
import { createDraft } from "@/services/estimates";
import { createBasin } from "@/services/basins";
import { atTime } from "@/services/clock";
import { closePool } from "@/services/compute/pool";
import { createDependenceSet, updateDependenceSet } from "@/services/dependence-sets";
import { createField } from "@/services/fields";
import { createFluidSample } from "@/services/fluid-samples";
import type { Actor, Role } from "@/services/policy";
import { createPriceDeck, publishPriceDeck } from "@/services/price-decks";
import { createReservoir } from "@/services/reservoirs";
import { getSettings, updateSettings } from "@/services/settings";
import { createFirstAdministrator, createUser } from "@/services/users";
import type { Estimate } from "@/models/estimate";
import { demoDependenceSets } from "./dependence-sets";
import { demoBasins, demoFields } from "./fields";
import { revisionsOf, type DemoRevision } from "./history";
import { inputsOf, separatorTestOf } from "./inputs";
import { demoPassword, demoPeople } from "./people";
import { demoDeckName, demoDecks } from "./price-decks";
import { planOf, recoveryOf, studyOf } from "./recovery-plans";
import { demoReservoirs, type DemoReservoir } from "./reservoirs";

type People = Record<Role, Actor>;

const morningOf = (date: string) => new Date(`${date}T08:30:00Z`);
const noonOf = (date: string) => new Date(`${date}T12:00:00Z`);
const openingDay = "2024-09-16";

/** Fill an empty database with the demo. Deterministic: the same rows and the same figures every time. */
export async function seedDemo(): Promise<void> {
  try {
    const people = await atTime(morningOf(openingDay), createPeople);
    await createDecks(people);
    const fieldIds = await atTime(noonOf(openingDay), () => createFields(people));
    for (const [index, reservoir] of demoReservoirs.entries()) {
      await createReservoirWithHistory(reservoir, index, fieldIds, people);
    }
  } finally {
    await closePool();
  }
}

async function createPeople(): Promise<People> {
  const people: Partial<People> = {};
  for (const { name, email, role } of demoPeople) {
    const input = { name, email, password: demoPassword };
    const user =
      role === "administrator"
        ? await createFirstAdministrator(input)
        : await createUser(required(people, "administrator"), { ...input, role });
    people[role] = { id: user.id, name: user.name, email: user.email, role };
  }
  const administrator = required(people, "administrator");
  const settings = await getSettings();
  await updateSettings(administrator, { organisationName: "Quillmere Gas" }, settings.version);
  return {
    administrator,
    engineer: required(people, "engineer"),
    reviewer: required(people, "reviewer"),
    planner: required(people, "planner"),
    executive: required(people, "executive"),
  };
}

function required(people: Partial<People>, role: Role): Actor {
  const person = people[role];
  if (!person) throw new Error(`the demo has no ${role}`);
  return person;
}

async function createDecks({ planner }: People): Promise<void> {
  for (const { asOfOn, note, prices } of demoDecks) {
    await atTime(morningOf(asOfOn), async () => {
      const input = { name: demoDeckName, currency: "USD", asOfOn, note, prices };
      const deck = await createPriceDeck(planner, input);
      await publishPriceDeck(planner, deck.id, deck.version);
    });
  }
}

/** @returns the ids of the fields by their names */
async function createFields({ engineer, planner }: People): Promise<Map<string, string>> {
  const basinIds = new Map<string, string>();
  for (const name of demoBasins) {
    basinIds.set(name, (await createBasin(planner, { name })).id);
  }
  const fieldIds = new Map<string, string>();
  for (const { basin, latitudeDeg, longitudeDeg, ...field } of demoFields) {
    const created = await createField(planner, {
      ...field,
      basinId: basinIds.get(basin) ?? "",
      latitude: latitudeDeg,
      longitude: longitudeDeg,
      responsibleEngineerId: engineer.id,
    });
    fieldIds.set(field.name, created.id);
  }
  await createDependenceSets(planner, basinIds, fieldIds);
  return fieldIds;
}

async function createDependenceSets(
  planner: Actor,
  basinIds: ReadonlyMap<string, string>,
  fieldIds: ReadonlyMap<string, string>,
): Promise<void> {
  for (const { name, note, portfolioRank, isDefault, ...set } of demoDependenceSets) {
    const basinRanks = Object.fromEntries(
      Object.entries(set.basinRanks).map(([basin, rank]) => [basinIds.get(basin) ?? "", rank]),
    );
    const sharedFactors = set.sharedFactors.map(({ fields, ...factor }) => ({
      ...factor,
      fieldIds: fields.map((field) => fieldIds.get(field) ?? ""),
    }));
    const dependence = {
      portfolioRank,
      basinRanks,
      otherBasinsRank: portfolioRank,
      sharedFactors,
    };
    const created = await createDependenceSet(planner, { name, note, dependence });
    if (isDefault) await updateDependenceSet(planner, created.id, { isDefault }, created.version);
  }
}

async function createReservoirWithHistory(
  demo: DemoReservoir,
  index: number,
  fieldIds: Map<string, string>,
  people: People,
): Promise<void> {
  const { engineer } = people;
  const test = separatorTestOf(demo);
  const revisions = revisionsOf(demo.field, demo.name, index);
  const reservoir = await atTime(noonOf(openingDay), () =>
    createReservoir(engineer, {
      fieldId: fieldIds.get(demo.field) ?? "",
      name: demo.name,
      depthFt: demo.depthFt,
    }),
  );
  const sample = await atTime(morningOf(laterOf(demo.fluid.sampledOn, openingDay)), () =>
    createFluidSample(engineer, {
      reservoirId: reservoir.id,
      name: demo.fluid.sample,
      sampledOn: demo.fluid.sampledOn,
      laboratory: demo.fluid.laboratory,
      separatorTest: test,
      study: studyOf(demo, test),
    }),
  );
  const recovery = await recoveryOf(demo, test);
  const firstApproved = revisions.findIndex(({ state }) => state === "approved");
  for (const [number, revision] of revisions.entries()) {
    // Earlier revisions had recoveries by analogy; the study came with the approved one.
    const followsFluid = firstApproved !== -1 && number >= firstApproved;
    const plan = recovery && followsFluid ? planOf(recovery, revision.concept) : null;
    const hasSample = revision.on >= demo.fluid.sampledOn;
    await createRevision(
      reservoir.id,
      hasSample ? sample.id : null,
      inputsOf(demo, test, revision, plan),
      revision,
      people,
    );
  }
}

async function createRevision(
  reservoirId: string,
  fluidSampleId: string | null,
  inputs: Estimate["inputs"],
  revision: DemoRevision,
  { engineer, reviewer }: People,
): Promise<void> {
  const { on, note, state, decision } = revision;
  const computed = await atTime(morningOf(on), async () => {
    const draft = await createDraft(engineer, reservoirId, { inputs, fluidSampleId, note });
    return runEstimate(engineer, draft.id, draft.version);
  });
  if (state === "draft") return;
  const submitted = await atTime(noonOf(on), () =>
    submitEstimate(engineer, computed.id, {}, computed.version),
  );
  if (!decision) return;
  await atTime(noonOf(decision.on), () =>
    state === "returned"
      ? returnEstimate(reviewer, submitted.id, decision, submitted.version)
      : approveEstimate(
          reviewer,
          submitted.id,
          { note: decision.note, effectiveOn: decision.on },
          submitted.version,
        ),
  );
}

const laterOf = (a: string, b: string) => (a > b ? a : b);
