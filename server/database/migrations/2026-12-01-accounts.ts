import { sql, type Kysely } from 'kysely'

/** Practices, accounts, and the counters that keep sign-in from being guessed at. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table practices (
      id uuid primary key default gen_random_uuid(),
      name text not null check (length(name) between 1 and 120),
      created_at timestamptz not null default now()
    )`.execute(db)

  await sql`
    create table accounts (
      id uuid primary key default gen_random_uuid(),
      practice_id uuid not null references practices,
      name text not null check (length(name) between 1 and 120),
      email text not null unique check (email = lower(email)),
      password_hash text not null,
      role text check (role in ('engineer', 'architect', 'cost-planner', 'checker')),
      session_version integer not null default 1,
      is_administrator boolean not null default false,
      deactivated_at timestamptz,
      created_at timestamptz not null default now()
    )`.execute(db)

  await sql`
    create table rate_limits (
      key varchar(255) primary key,
      points integer not null default 0,
      expire bigint
    )`.execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table rate_limits, accounts, practices`.execute(db)
}
