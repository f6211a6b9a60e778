import { randomUUID } from "node:crypto";
import pg from "pg";
import { seedOf } from "@/services/seeds";
import { makeReservoirs } from "./workload";

const RESERVOIRS_PER_FIELD = 10;

/** One draft of the book that has to be computed. */
export interface BookDraft {
  id: string;
  seed: number;
  inputs: ReturnType<typeof makeReservoirs>[number]["inputs"];
}

export interface RunBook {
  /** whose drafts they are, and in whose name they are run */
  engineer: { id: string; name: string; email: string; role: "engineer" };
  drafts: BookDraft[];
  /** one more draft, whose inputs the engine refuses */
  impossible: BookDraft;
}

/**
 * Fill an empty, migrated database with made-up fields and a draft without results for each reservoir, and count in the
 * table `storings` every time that trials are stored, whoever does it.
 */
export async function makeRunBook(
  client: pg.Client,
  { reservoirs, trials }: { reservoirs: number; trials: number },
): Promise<RunBook> {
  const engineer = {
    id: randomUUID(),
    name: "Wynne Harrowby",
    email: "wynne.harrowby@quillmere.example",
    role: "engineer" as const,
  };
  await client.query(
    "insert into users (id, email, name, password_hash, role) values ($1, $2, $3, '', 'engineer')",
    [engineer.id, engineer.email, engineer.name],
  );
  const basinId = randomUUID();
  await client.query("insert into basins (id, slug, name) values ($1, 'basin', 'Basin')", [
    basinId,
  ]);

  const drafts: BookDraft[] = [];
  let fieldId = "";
  for (const [index, { inputs }] of makeReservoirs(reservoirs + 1).entries()) {
    const slug = `field-${Math.floor(index / RESERVOIRS_PER_FIELD) + 1}`;
    if (index % RESERVOIRS_PER_FIELD === 0) {
      fieldId = randomUUID();
      await client.query(
        `insert into fields (id, slug, name, basin_id, operator, working_interest,
            net_revenue_interest, prms_class, prms_sub_class, chance_of_commerciality)
          values ($1, $2, $2, $3, 'Quillmere Gas', 0.6, 0.5, 'contingent', 'development_pending', 0.7)`,
        [fieldId, slug, basinId],
      );
    }
    const reservoirId = randomUUID();
    const name = `sand-${index + 1}`;
    await client.query(
      "insert into reservoirs (id, field_id, slug, name) values ($1, $2, $3, $3)",
      [reservoirId, fieldId, name],
    );
    const draft = { id: randomUUID(), seed: seedOf(slug, name), inputs };
    if (index === reservoirs) makeImpossible(draft);
    await client.query(
      `insert into estimates (id, reservoir_id, revision, state, inputs, schema_version, seed,
          trials, sampling, created_by)
        values ($1, $2, 1, 'draft', $3, 1, $4, $5, 'latinHypercube', $6)`,
      [draft.id, reservoirId, JSON.stringify(draft.inputs), draft.seed, trials, engineer.id],
    );
    drafts.push(draft);
  }
  const impossible = drafts.pop();
  if (!impossible) throw new RangeError("a book has at least one reservoir");
  await client.query(`
    create table storings (estimate_id uuid not null);
    create function count_storing() returns trigger language plpgsql as $body$
    begin
      insert into storings values (new.estimate_id);
      return new;
    end
    $body$;
    create trigger count_storings after insert or update on estimate_trials
      for each row execute function count_storing();
  `);
  return { engineer, drafts, impossible };
}

function makeImpossible(draft: BookDraft): void {
  draft.inputs.uncertain.pressurePsia.distribution = { kind: "constant", value: -1 };
}
