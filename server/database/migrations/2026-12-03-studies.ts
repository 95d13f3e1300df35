import { sql, type Kysely } from 'kysely'

/** Studies with their frozen inputs, the parts that workers hand in, and the ranked schemes. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table studies (
      id uuid primary key default gen_random_uuid(),
      project_id uuid not null references projects on delete cascade,
      number integer not null,
      plate_id uuid not null references plates,
      plate_name text not null,
      plate_version integer not null,
      basis_version integer not null,
      inputs jsonb not null,
      engine_version text not null,
      state text not null default 'queued'
        check (state in ('queued', 'running', 'finished', 'cancelled', 'failed')),
      total integer not null check (total >= 0),
      progress jsonb not null,
      part_size integer,
      parts_total integer,
      parts_done integer not null default 0,
      lightest jsonb,
      started_by uuid not null references accounts,
      created_at timestamptz not null default now(),
      started_at timestamptz,
      finished_at timestamptz,
      told_at timestamptz,
      unique (project_id, number)
    )`.execute(db)

  await sql`
    create function study_inputs_are_frozen() returns trigger language plpgsql as $$
    begin
      if new.inputs is distinct from old.inputs or new.engine_version is distinct from old.engine_version then
        raise exception 'The inputs of a study never change.';
      end if;
      return new;
    end $$`.execute(db)
  await sql`
    create trigger study_inputs_frozen before update of inputs, engine_version on studies
    for each row execute function study_inputs_are_frozen()`.execute(db)

  // text, not jsonb: a part is only ever read whole, and parsing it twice would cost more than the search.
  await sql`
    create table study_parts (
      study_id uuid not null references studies on delete cascade,
      number integer not null,
      result text,
      done_at timestamptz not null default now(),
      primary key (study_id, number)
    )`.execute(db)

  await makeSchemes(db)
}

async function makeSchemes(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table schemes (
      study_id uuid not null references studies on delete cascade,
      key text not null,
      number integer not null,
      rank integer not null,
      mass double precision not null,
      mass_per_area double precision not null,
      depth double precision not null,
      pieces integer not null,
      distinct_sections integer not null,
      primary_direction text not null,
      divisions integer not null,
      depth_cap double precision,
      on_trade_off_line boolean not null,
      summary jsonb not null,
      primary key (study_id, key),
      unique (study_id, rank)
    )`.execute(db)
  for (const column of ['mass', 'depth', 'pieces', 'distinct_sections']) {
    await sql`create index ${sql.raw(`schemes_by_${column}`)} on schemes (study_id, ${sql.ref(column)}, rank)`.execute(db)
  }
  await sql`create index schemes_trade_off on schemes (study_id, rank) where on_trade_off_line`.execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table schemes, study_parts, studies`.execute(db)
  await sql`drop function study_inputs_are_frozen()`.execute(db)
}
