import { ApiToken } from "./api-token";
import { AuditEvent } from "./audit-event";
import { Basin } from "./basin";
import { DependenceSet } from "./dependence-set";
import { Estimate } from "./estimate";
import { EstimateTrials } from "./estimate-trials";
import { Field } from "./field";
import { FluidSample } from "./fluid-sample";
import { Import } from "./import";
import { PriceDeck } from "./price-deck";
import { PriceDeckPrice } from "./price-deck-price";
import { Reservoir } from "./reservoir";
import { Run } from "./run";
import { RunItem } from "./run-item";
import { Settings } from "./settings";
import { User } from "./user";

const models = [
  ...[
    ApiToken,
    AuditEvent,
    Basin,
    DependenceSet,
    Estimate,
    EstimateTrials,
    Field,
    FluidSample,
    Import,
  ],
  ...[PriceDeck, PriceDeckPrice, Reservoir, Run, RunItem, Settings, User],
];
// Hot reload runs this file again on models that it did not load again: they begin without associations each time.
for (const { associations } of models) {
  for (const alias of Object.keys(associations)) delete associations[alias];
}

ApiToken.belongsTo(User, { as: "user", foreignKey: "userId" });
AuditEvent.belongsTo(User, { as: "actor", foreignKey: "actorId" });

Field.belongsTo(Basin, { as: "basin", foreignKey: "basinId" });
Field.belongsTo(User, { as: "responsibleEngineer", foreignKey: "responsibleEngineerId" });
Field.hasMany(Reservoir, { as: "reservoirs", foreignKey: "fieldId" });
Basin.hasMany(Field, { as: "fields", foreignKey: "basinId" });

Reservoir.belongsTo(Field, { as: "field", foreignKey: "fieldId" });
Reservoir.hasMany(FluidSample, { as: "fluidSamples", foreignKey: "reservoirId" });
Reservoir.hasMany(Estimate, { as: "estimates", foreignKey: "reservoirId" });
FluidSample.belongsTo(Reservoir, { as: "reservoir", foreignKey: "reservoirId" });

Estimate.belongsTo(Reservoir, { as: "reservoir", foreignKey: "reservoirId" });
Estimate.belongsTo(FluidSample, { as: "fluidSample", foreignKey: "fluidSampleId" });
Estimate.belongsTo(User, { as: "creator", foreignKey: "createdBy" });
Estimate.belongsTo(User, { as: "submitter", foreignKey: "submittedBy" });
Estimate.belongsTo(User, { as: "decider", foreignKey: "decidedBy" });
Estimate.hasOne(EstimateTrials, { as: "vectors", foreignKey: "estimateId" });
EstimateTrials.belongsTo(Estimate, { as: "estimate", foreignKey: "estimateId" });

DependenceSet.belongsTo(User, { as: "updater", foreignKey: "updatedBy" });

PriceDeck.hasMany(PriceDeckPrice, { as: "prices", foreignKey: "priceDeckId" });
PriceDeckPrice.belongsTo(PriceDeck, { as: "deck", foreignKey: "priceDeckId" });
PriceDeck.belongsTo(User, { as: "creator", foreignKey: "createdBy" });
PriceDeck.belongsTo(User, { as: "publisher", foreignKey: "publishedBy" });

Import.belongsTo(User, { as: "creator", foreignKey: "createdBy" });

Run.belongsTo(User, { as: "creator", foreignKey: "createdBy" });
Run.hasMany(RunItem, { as: "items", foreignKey: "runId" });
RunItem.belongsTo(Run, { as: "run", foreignKey: "runId" });
RunItem.belongsTo(Reservoir, { as: "reservoir", foreignKey: "reservoirId" });

/** Every query goes through here, so that no model is ever used before its associations exist. */
export {
  ApiToken,
  AuditEvent,
  Basin,
  DependenceSet,
  Estimate,
  EstimateTrials,
  Field,
  FluidSample,
  Import,
  PriceDeck,
  PriceDeckPrice,
  Reservoir,
  Run,
  RunItem,
  Settings,
  User,
};
