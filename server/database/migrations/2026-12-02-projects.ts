import { sql, type Kysely } from 'kysely'

/** Projects, who is on them, plates and bases of design with every version kept, and the activity log. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table projects (
      id uuid primary key default gen_random_uuid(),
      practice_id uuid not null references practices,
      number text not null check (length(number) between 1 and 20),
      name text not null check (length(name) between 1 and 120),
      created_at timestamptz not null default now(),
      changed_at timestamptz not null default now(),
      unique (practice_id, number)
    )`.execute(db)

  await sql`
    create table project_members (
      project_id uuid not null references projects on delete cascade,
      account_id uuid not null references accounts,
      role text not null check (role in ('engineer', 'architect', 'cost-planner', 'checker')),
      added_at timestamptz not null default now(),
      primary key (project_id, account_id)
    )`.execute(db)
  await sql`create index project_members_account on project_members (account_id)`.execute(db)

  await sql`
    create table plates (
      id uuid primary key default gen_random_uuid(),
      project_id uuid not null references projects on delete cascade,
      name text not null,
      version integer not null check (version >= 1),
      area double precision not null,
      document jsonb not null,
      saved_at timestamptz not null default now(),
      saved_by uuid not null references accounts,
      created_at timestamptz not null default now()
    )`.execute(db)
  await sql`create index plates_project on plates (project_id, created_at)`.execute(db)

  await sql`
    create table plate_versions (
      plate_id uuid not null references plates on delete cascade,
      version integer not null,
      document jsonb not null,
      saved_at timestamptz not null default now(),
      saved_by uuid not null references accounts,
      primary key (plate_id, version)
    )`.execute(db)

  await sql`
    create table bases (
      project_id uuid not null references projects on delete cascade,
      version integer not null check (version >= 1),
      document jsonb not null,
      saved_at timestamptz not null default now(),
      saved_by uuid not null references accounts,
      primary key (project_id, version)
    )`.execute(db)

  await makeActivity(db)
}

async function makeActivity(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table activity (
      id bigint generated always as identity primary key,
      practice_id uuid not null references practices,
      project_id uuid references projects,
      account_id uuid references accounts,
      action text not null,
      subject jsonb not null default '{}',
      at timestamptz not null default now()
    )`.execute(db)
  await sql`create index activity_project on activity (project_id, at desc)`.execute(db)
  await sql`
    create function activity_is_append_only() returns trigger language plpgsql as $$
    begin
      raise exception 'The activity log is append-only.';
    end $$`.execute(db)
  await sql`
    create trigger activity_append_only before update or delete on activity
    for each row execute function activity_is_append_only()`.execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table activity, bases, plate_versions, plates, project_members, projects`.execute(db)
  await sql`drop function activity_is_append_only()`.execute(db)
}
