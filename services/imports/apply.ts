import { createBasin } from "../basins";
import { createDraft, updateDraft } from "../estimates";
import { createField, updateField } from "../fields";
import { createFluidSample, updateFluidSample } from "../fluid-samples";
import type { Actor } from "../policy";
import { createReservoir, updateReservoir } from "../reservoirs";
import { nameKey } from "./name-key";
import type { Book, RowPlan } from "./plan";

/** Where a row ended up. */
export interface Applied {
  fieldSlug: string;
  reservoirSlug: string;
  estimateId: string | null;
}

interface Place {
  id: string;
  slug: string;
}

/**
 * Writes planned rows to the book, through the same use cases as work by hand, so that its rules and its audit trail
 * hold. Basins and fields that an earlier row made are used by the later ones. Runs within one transaction.
 */
export class Applier {
  private readonly basins = new Map<string, string>();
  private readonly fields = new Map<string, Place>();
  private readonly updatedFields = new Set<string>();

  constructor(
    private readonly actor: Actor,
    private readonly importId: string,
    book: Book,
  ) {
    for (const [key, basin] of book.basins) this.basins.set(key, basin.id);
    for (const [key, field] of book.fields) this.fields.set(key, field);
  }

  async apply(plan: RowPlan): Promise<Applied> {
    const field = await this.field(plan);
    await this.changeField(plan);
    const reservoir = await this.reservoir(plan, field.id);
    const fluidSampleId = await this.sample(plan, reservoir.id);
    const estimateId = await this.estimate(plan, reservoir.id, fluidSampleId);
    return { fieldSlug: field.slug, reservoirSlug: reservoir.slug, estimateId };
  }

  private async basin(name: string): Promise<string> {
    const key = nameKey(name);
    const known = this.basins.get(key);
    if (known) return known;
    const { id } = await createBasin(this.actor, { name });
    this.basins.set(key, id);
    return id;
  }

  private async field(plan: RowPlan): Promise<Place> {
    const key = nameKey(plan.field);
    const known = this.fields.get(key);
    if (known) return known;
    const { operator, workingInterest, netRevenueInterest, ...rest } = plan.row.fieldData;
    const { prmsClass, prmsSubClass, chanceOfCommerciality } = rest;
    if (
      operator === null ||
      workingInterest === null ||
      netRevenueInterest === null ||
      prmsClass === null ||
      prmsSubClass === null ||
      chanceOfCommerciality === null
    ) {
      throw new Error(`line ${plan.line} makes a field without its data`);
    }
    const created = await createField(this.actor, {
      name: plan.field,
      basinId: await this.basin(plan.basin),
      operator,
      workingInterest,
      netRevenueInterest,
      prmsClass,
      prmsSubClass,
      chanceOfCommerciality,
      responsibleEngineerId: this.actor.role === "engineer" ? this.actor.id : null,
    });
    this.fields.set(key, created);
    return created;
  }

  /** Rows of one field agree with each other, so the first that carries a change makes it. */
  private async changeField({ bookField, fieldChanges }: RowPlan): Promise<void> {
    if (!bookField || Object.keys(fieldChanges).length === 0) return;
    if (this.updatedFields.has(bookField.id)) return;
    this.updatedFields.add(bookField.id);
    await updateField(this.actor, bookField.id, fieldChanges, bookField.version);
  }

  private async reservoir(plan: RowPlan, fieldId: string): Promise<Place> {
    const { bookReservoir, depthFt } = plan;
    if (!bookReservoir) {
      return createReservoir(this.actor, { fieldId, name: plan.reservoir, depthFt });
    }
    if (depthFt !== bookReservoir.depthFt) {
      await updateReservoir(this.actor, bookReservoir.id, { depthFt }, bookReservoir.version);
    }
    return bookReservoir;
  }

  private async sample(plan: RowPlan, reservoirId: string): Promise<string | null> {
    const { name, sampledOn, laboratory, separatorTest } = plan.row.sample;
    if (plan.sample === "create") {
      const values = { reservoirId, name, sampledOn, laboratory, separatorTest };
      return (await createFluidSample(this.actor, values)).id;
    }
    if (!plan.bookSample) return null;
    if (plan.sample === "update") {
      const { id, version } = plan.bookSample;
      const patch = { sampledOn, separatorTest, ...(laboratory !== "" && { laboratory }) };
      await updateFluidSample(this.actor, id, patch, version);
    }
    return plan.bookSample.id;
  }

  private async estimate(
    plan: RowPlan,
    reservoirId: string,
    fluidSampleId: string | null,
  ): Promise<string | null> {
    const { inputs, row, bookReservoir } = plan;
    const note = row.note || `Import ${this.importId.slice(0, 8)}, line ${plan.line}`;
    if (plan.estimate === "create") {
      const values = { inputs, fluidSampleId, note };
      return (await createDraft(this.actor, reservoirId, values)).id;
    }
    const latest = bookReservoir?.latest;
    if (plan.estimate === "update" && latest) {
      const patch = { inputs, fluidSampleId, ...(row.note !== "" && { note: row.note }) };
      return (await updateDraft(this.actor, latest.id, patch, latest.version)).id;
    }
    return null;
  }
}
