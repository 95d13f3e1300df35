import { sql, type Kysely } from 'kysely'

/** Answers that workers give to questions about a ranked study: one for each question. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create table answers (
      study_id uuid not null references studies on delete cascade,
      question text not null check (length(question) between 1 and 100),
      state text not null default 'queued' check (state in ('queued', 'running', 'finished', 'failed')),
      result jsonb,
      failure text,
      engine_version text,
      asked_by uuid not null references accounts,
      asked_at timestamptz not null default now(),
      answered_at timestamptz,
      primary key (study_id, question),
      check ((state = 'finished') = (result is not null)),
      check ((state = 'failed') = (failure is not null))
    )`.execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`drop table answers`.execute(db)
}
