import type { QueryInterface } from "sequelize";

/** A sheet's plan, its entries, what was struck out and its closing are each written once and never changed. */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create sequence test_sheet_number;
    create table test_sheets (
      id uuid primary key default gen_random_uuid(),
      number int not null unique default nextval('test_sheet_number'),
      machine_id uuid not null references machines,
      axis text not null,
      test text not null,
      change_id uuid references change_requests,
      plan jsonb not null,
      actor_id uuid not null references users,
      actor_name text not null,
      created_at timestamptz not null
    );
    create index test_sheets_machine on test_sheets (machine_id, number desc);
    create index test_sheets_change on test_sheets (change_id) where change_id is not null;
    create table test_trials (
      id uuid primary key,
      sheet_id uuid not null references test_sheets,
      data jsonb not null,
      done_at timestamptz not null,
      received_at timestamptz not null,
      actor_id uuid not null references users,
      actor_name text not null
    );
    create index test_trials_sheet on test_trials (sheet_id, done_at);
    create table test_strikes (
      trial_id uuid primary key references test_trials,
      sheet_id uuid not null references test_sheets,
      reason text not null,
      at timestamptz not null,
      actor_id uuid not null references users,
      actor_name text not null
    );
    create index test_strikes_sheet on test_strikes (sheet_id);
    create table test_closings (
      sheet_id uuid primary key references test_sheets,
      outcome text not null check (outcome in ('finished','broken_off')),
      result jsonb not null,
      note text not null default '',
      at timestamptz not null,
      actor_id uuid not null references users,
      actor_name text not null
    );
    create trigger test_sheets_append_only before update or delete on test_sheets for each row execute function refuse_rewrite();
    create trigger test_trials_append_only before update or delete on test_trials for each row execute function refuse_rewrite();
    create trigger test_strikes_append_only before update or delete on test_strikes for each row execute function refuse_rewrite();
    create trigger test_closings_append_only before update or delete on test_closings for each row execute function refuse_rewrite();
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(
    "drop table test_closings, test_strikes, test_trials, test_sheets; drop sequence test_sheet_number",
  );
}
