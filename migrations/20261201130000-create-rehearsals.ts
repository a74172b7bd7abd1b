import type { QueryInterface } from "sequelize";

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table rehearsals (
      id uuid primary key default gen_random_uuid(),
      question jsonb not null,
      site_id uuid references sites,
      model_id uuid references machine_models,
      title text not null,
      state text not null default 'waiting' check (state in ('waiting','running','done')),
      rules_version text not null,
      policy_version int not null,
      policy jsonb not null,
      started_by uuid references users,
      started_by_name text not null,
      started_at timestamptz not null,
      ended_at timestamptz,
      check ((state = 'done') = (ended_at is not null))
    );
    create index rehearsals_newest on rehearsals (started_at desc);
    create table rehearsal_machines (
      rehearsal_id uuid not null references rehearsals,
      machine_id uuid not null references machines,
      outcome jsonb,
      newly_over boolean not null default false,
      hottest_room_c double precision,
      rehearsed_at timestamptz,
      primary key (rehearsal_id, machine_id),
      check ((outcome is null) = (rehearsed_at is null))
    );
    create index rehearsal_machines_waiting on rehearsal_machines (rehearsal_id) where outcome is null;
    create index rehearsal_machines_over on rehearsal_machines (rehearsal_id) where newly_over;
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query("drop table rehearsal_machines, rehearsals");
}
