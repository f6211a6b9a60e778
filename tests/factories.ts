import { randomUUID } from "node:crypto";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import type { FieldView } from "@/app/api/v1/fields/schema";
import type { FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import type { ReservoirView } from "@/app/api/v1/reservoirs/schema";
import type { Role } from "@/services/policy";
import { signIn, type ApiAnswer, type ApiClient } from "./support/api";

/** A name that no other test uses. */
export function uniqueName(word: string): string {
  return `${word} ${randomUUID().slice(0, 8)}`;
}

const sessions = new Map<Role, Promise<ApiClient>>();

/** The demo's person of a role, signed in once a file: hashing a password takes its time on purpose. */
export function as(role: Role): Promise<ApiClient> {
  const session = sessions.get(role) ?? signIn(role);
  sessions.set(role, session);
  return session;
}

/** The header that says which version a write is about. */
export function ifMatch(row: { version: number }) {
  return { headers: { "If-Match": `"${row.version}"` } };
}

/** The body of an answer that must be a success. */
export function made<Body>(answer: ApiAnswer<Body>): Body {
  if (answer.status >= 300) {
    throw new Error(`expected success, got ${answer.status}: ${JSON.stringify(answer.body)}`);
  }
  return answer.body;
}

export async function buildBasin(): Promise<BasinView> {
  const planner = await as("planner");
  const body = { name: uniqueName("Basin") };
  return made(await planner.post<BasinView>("/api/v1/basins", body));
}

export async function buildField(values: Record<string, unknown> = {}): Promise<FieldView> {
  const planner = await as("planner");
  const body = {
    name: uniqueName("Field"),
    basinId: values.basinId ?? (await buildBasin()).id,
    operator: "Quillmere Gas",
    workingInterest: 0.6,
    netRevenueInterest: 0.51,
    prmsClass: "contingent",
    prmsSubClass: "development_pending",
    chanceOfCommerciality: 0.7,
    ...values,
  };
  return made(await planner.post<FieldView>("/api/v1/fields", body));
}

export async function buildReservoir(): Promise<ReservoirView> {
  const engineer = await as("engineer");
  const body = { fieldId: (await buildField()).id, name: uniqueName("Sand"), depthFt: 11_200 };
  return made(await engineer.post<ReservoirView>("/api/v1/reservoirs", body));
}

/** An everyday lean gas condensate; the figures are only plausible. */
export function separatorTest(values: Partial<SeparatorTest> = {}): SeparatorTest {
  return {
    basePressurePsia: 14.696,
    primarySeparator: {
      pressurePsia: 500,
      temperatureDegF: 80,
      gasOilRatioScfPerStb: 17_500,
      gasGravity: 0.69,
    },
    secondSeparator: null,
    stockTankGas: { gasOilRatioScfPerStb: 320, gasGravity: 1.21 },
    condensateApi: 54,
    condensateMolecularWeight: null,
    nitrogen: 0.01,
    carbonDioxide: 0.02,
    hydrogenSulphide: 0,
    dewPointPsia: 4100,
    ...values,
  };
}

export function estimateInputs(values: Partial<EstimateInputs> = {}): EstimateInputs {
  const given = (distribution: EstimateInputs["uncertain"]["porosity"]["distribution"]) => ({
    distribution,
    source: "made for a test",
  });
  return {
    schemaVersion: 1,
    uncertain: {
      areaAcres: given({ kind: "lognormalP90P10", p90: 2800, p10: 5600 }),
      netThicknessFt: given({ kind: "pert", low: 60, mode: 90, high: 130 }),
      porosity: given({ kind: "normalP90P10", p90: 0.11, p10: 0.16, minimum: 0, maximum: 0.4 }),
      waterSaturation: given({ kind: "triangular", low: 0.18, mode: 0.25, high: 0.34 }),
      pressurePsia: given({ kind: "constant", value: 5400 }),
      temperatureDegF: given({ kind: "constant", value: 240 }),
      condensateYieldStbPerMmscf: given({ kind: "uniform", low: 48, high: 64 }),
      gasRecovery: given({ kind: "triangular", low: 0.6, mode: 0.7, high: 0.8 }),
      condensateRecovery: given({ kind: "triangular", low: 0.3, mode: 0.42, high: 0.55 }),
      salesGasFraction: given({ kind: "constant", value: 0.93 }),
    },
    correlations: [],
    fluid: separatorTest(),
    depthFt: 11_200,
    recoveryPlan: null,
    ...values,
  };
}

/** The same inputs with one of them certain. */
export function withConstant(
  inputs: EstimateInputs,
  name: keyof EstimateInputs["uncertain"],
  value: number,
): EstimateInputs {
  const constant = { distribution: { kind: "constant" as const, value }, source: "" };
  return { ...inputs, uncertain: { ...inputs.uncertain, [name]: constant } };
}

export async function buildFluidSample(reservoirId: string): Promise<FluidSampleView> {
  const engineer = await as("engineer");
  const body = {
    reservoirId,
    name: uniqueName("Sample"),
    sampledOn: "2026-03-14",
    laboratory: "Test laboratory",
    separatorTest: separatorTest(),
  };
  return made(await engineer.post<FluidSampleView>("/api/v1/fluid-samples", body));
}

export async function buildDraft(reservoirId?: string): Promise<EstimateView> {
  const engineer = await as("engineer");
  const path = `/api/v1/reservoirs/${reservoirId ?? (await buildReservoir()).id}/estimates`;
  const body = { inputs: estimateInputs(), trials: 1000 };
  return made(await engineer.post<EstimateView>(path, body));
}

export async function buildSubmitted(reservoirId?: string): Promise<EstimateView> {
  const engineer = await as("engineer");
  const draft = await buildDraft(reservoirId);
  const path = `/api/v1/estimates/${draft.id}`;
  const run = made(await engineer.post<EstimateView>(`${path}/run`, undefined, ifMatch(draft)));
  return made(await engineer.post<EstimateView>(`${path}/submit`, {}, ifMatch(run)));
}

export async function buildApproved(reservoirId?: string): Promise<EstimateView> {
  const reviewer = await as("reviewer");
  const submitted = await buildSubmitted(reservoirId);
  const path = `/api/v1/estimates/${submitted.id}/approve`;
  return made(await reviewer.post<EstimateView>(path, {}, ifMatch(submitted)));
}

export async function buildPriceDeck(name = uniqueName("Deck")): Promise<PriceDeckView> {
  const planner = await as("planner");
  const body = { name, currency: "USD", asOfOn: "2020-01-31", prices: deckPrices() };
  return made(await planner.post<PriceDeckView>("/api/v1/price-decks", body));
}

export function deckPrices() {
  const cases = [
    { priceCase: "low", condensate: 52, gas: 3 },
    { priceCase: "mid", condensate: 68.5, gas: 4.25 },
    { priceCase: "high", condensate: 85, gas: 6 },
  ];
  return cases.flatMap(({ priceCase, condensate, gas }) => [
    { product: "condensate", priceCase, benchmark: condensate, differential: -3.2 },
    { product: "gas", priceCase, benchmark: gas, differential: 0 },
  ]);
}
