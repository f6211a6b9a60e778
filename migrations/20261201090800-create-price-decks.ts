import type { QueryInterface } from "sequelize";

/**
 * Flat real prices by product and case. Money is numeric, never floating point. A published deck is what a ranking was
 * computed on, so it stands still with its prices; a correction is a new version under the same name.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table price_decks (
      id uuid primary key default gen_random_uuid(),
      name text not null check (btrim(name) <> ''),
      version_number integer not null check (version_number > 0),
      currency text not null check (currency ~ '^[A-Z]{3}$'),
      as_of_on date not null,
      state text not null check (state in ('draft', 'published')),
      note text not null default '',
      created_by uuid not null references users (id),
      published_by uuid references users (id),
      published_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      constraint price_decks_published_whole check (
        (state = 'published') = (published_at is not null and published_by is not null))
    );
    create unique index price_decks_name_unique on price_decks (lower(name), version_number);

    create table price_deck_prices (
      id uuid primary key default gen_random_uuid(),
      price_deck_id uuid not null references price_decks (id) on delete cascade,
      product text not null,
      price_case text not null check (price_case in ('low', 'mid', 'high')),
      benchmark numeric(14, 4) not null check (benchmark >= 0),
      differential numeric(14, 4) not null default 0,
      unit text not null,
      constraint price_deck_prices_unit check (
        (product = 'condensate' and unit = 'per_stb')
        or (product = 'gas' and unit = 'per_mscf')
        or (product = 'plant_liquids' and unit = 'per_bbl')),
      constraint price_deck_prices_unique unique (price_deck_id, product, price_case)
    );

    create function protect_published_deck() returns trigger language plpgsql as $body$
    begin
      if old.state = 'published' then
        raise exception 'price deck % is published and cannot be changed', old.id
          using errcode = 'check_violation', constraint = 'price_decks_immutable';
      end if;
      return case when tg_op = 'DELETE' then old else new end;
    end
    $body$;
    create trigger protect_published_deck before update or delete on price_decks
      for each row execute function protect_published_deck();

    create function protect_published_prices() returns trigger language plpgsql as $body$
    declare
      deck_id uuid := case when tg_op = 'INSERT' then new.price_deck_id else old.price_deck_id end;
    begin
      if exists (select 1 from price_decks where id = deck_id and state = 'published')
        or (tg_op = 'UPDATE' and new.price_deck_id <> old.price_deck_id)
      then
        raise exception 'the prices of deck % are published and cannot be changed', deck_id
          using errcode = 'check_violation', constraint = 'price_decks_immutable';
      end if;
      return case when tg_op = 'DELETE' then old else new end;
    end
    $body$;
    create trigger protect_published_prices before insert or update or delete on price_deck_prices
      for each row execute function protect_published_prices();
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    drop table price_deck_prices;
    drop table price_decks;
    drop function protect_published_prices();
    drop function protect_published_deck();
  `);
}
