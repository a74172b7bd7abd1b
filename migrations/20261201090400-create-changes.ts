import type { QueryInterface } from "sequelize";

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create sequence change_number;
    create table change_requests (
      id uuid primary key default gen_random_uuid(),
      number int not null unique default nextval('change_number'),
      kind text not null check (kind in ('baseline','deviation')),
      title text not null,
      reason text not null,
      class text not null check (class in ('I','II')),
      state text not null check (state in ('draft','evaluation','approved','implementation','verified','declined','deferred','withdrawn','superseded','backed_out')),
      model_id uuid not null references machine_models,
      machine_id uuid references machines,
      effectivity jsonb not null,
      deviation_until date,
      current_version int not null default 0,
      lock_version int not null default 1,
      author_id uuid references users,
      author_name text not null,
      last_editor_id uuid references users,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      submitted_at timestamptz,
      decided_at timestamptz,
      check ((kind = 'deviation') = (machine_id is not null))
    );
    create index change_requests_state on change_requests (state, updated_at desc);
    create table baselines (
      id uuid primary key default gen_random_uuid(),
      model_id uuid not null references machine_models,
      number int not null,
      revision_id uuid not null references revisions,
      change_id uuid references change_requests,
      approved_at timestamptz not null,
      approved_by_name text not null,
      voided_at timestamptz,
      void_reason text,
      unique (model_id, number)
    );
    create table machine_baselines (
      id uuid primary key default gen_random_uuid(),
      machine_id uuid not null references machines,
      baseline_id uuid not null references baselines,
      change_id uuid references change_requests,
      from_at timestamptz not null,
      until_at timestamptz
    );
    create unique index machine_baselines_open on machine_baselines (machine_id) where until_at is null;
    create table evaluations (
      id uuid primary key default gen_random_uuid(),
      revision_id uuid not null references revisions,
      machine_id uuid references machines,
      rules_version text not null,
      policy_version int not null references policies,
      key_table_id uuid references key_tables,
      assembly jsonb not null,
      assembly_hash char(64) not null,
      report jsonb not null,
      level text not null,
      created_at timestamptz not null default now()
    );
    create trigger evaluations_append_only before update or delete on evaluations for each row execute function refuse_rewrite();
    create table findings (
      id uuid primary key default gen_random_uuid(),
      evaluation_id uuid not null references evaluations,
      rule_id text not null,
      level text not null,
      axis text,
      value double precision,
      limit_value double precision,
      unit text not null,
      sentence text not null
    );
    create index findings_evaluation on findings (evaluation_id);
    create index findings_rule on findings (rule_id, level);
    create table proposal_versions (
      id uuid primary key default gen_random_uuid(),
      change_id uuid not null references change_requests,
      version int not null,
      revision_id uuid not null references revisions,
      base_revision_id uuid references revisions,
      base_baseline_id uuid references baselines,
      base_hash char(64) not null,
      base_evaluation_id uuid references evaluations,
      evaluation_id uuid not null references evaluations,
      machines_evaluated jsonb not null default '[]',
      title text not null,
      reason text not null,
      class text not null,
      effectivity jsonb not null,
      deviation_until date,
      editor_id uuid references users,
      editor_name text not null,
      note text not null default '',
      signed_content_hash char(64) not null,
      created_at timestamptz not null default now(),
      unique (change_id, version)
    );
    create trigger proposal_versions_append_only before update or delete on proposal_versions for each row execute function refuse_rewrite();
    create table comments (
      id uuid primary key default gen_random_uuid(),
      change_id uuid not null references change_requests,
      proposal_version int not null,
      anchor jsonb not null,
      body text not null,
      author_id uuid,
      author_name text not null,
      created_at timestamptz not null default now()
    );
    create trigger comments_append_only before update or delete on comments for each row execute function refuse_rewrite();
    create table dispositions (
      id uuid primary key default gen_random_uuid(),
      change_id uuid not null references change_requests,
      proposal_version int not null,
      decision text not null check (decision in ('approved','declined','deferred','backed_out')),
      meaning text not null,
      signed_hash char(64) not null,
      reason text not null default '',
      justifications jsonb not null default '{}',
      actor_id uuid not null references users,
      actor_name text not null,
      at timestamptz not null,
      void_at timestamptz,
      void_reason text
    );
    create unique index dispositions_one_approval on dispositions (change_id) where decision = 'approved' and void_at is null;
    create table lots (
      id uuid primary key default gen_random_uuid(),
      change_id uuid not null references change_requests,
      number int not null,
      released_by_name text not null,
      released_at timestamptz not null,
      unique (change_id, number)
    );
    create table lot_machines (
      id uuid primary key default gen_random_uuid(),
      lot_id uuid not null references lots,
      change_id uuid not null references change_requests,
      machine_id uuid not null references machines,
      released_at timestamptz not null,
      downloaded_at timestamptz,
      applied_at timestamptz,
      applied_reading_id uuid references readings,
      verified_at timestamptz,
      ended_at timestamptz,
      unique (change_id, machine_id)
    );
    create unique index lot_machines_open on lot_machines (machine_id) where verified_at is null and ended_at is null;
    create table verifications (
      id uuid primary key default gen_random_uuid(),
      change_id uuid not null references change_requests,
      machine_id uuid not null references machines,
      lot_machine_id uuid not null references lot_machines,
      tested text not null,
      result text not null check (result in ('pass','fail')),
      ambient_c double precision,
      temperatures jsonb not null default '[]',
      statement text,
      note text not null default '',
      actor_id uuid not null references users,
      actor_name text not null,
      at timestamptz not null
    );
    create trigger verifications_append_only before update or delete on verifications for each row execute function refuse_rewrite();
    create table attachments (
      id uuid primary key default gen_random_uuid(),
      verification_id uuid not null references verifications,
      name text not null,
      media_type text not null,
      size int not null,
      sha256 char(64) not null references file_contents,
      created_at timestamptz not null default now()
    );
    create table deviations (
      id uuid primary key default gen_random_uuid(),
      machine_id uuid not null references machines,
      change_id uuid references change_requests,
      revision_id uuid not null references revisions,
      base_baseline_id uuid not null references baselines,
      edits jsonb not null,
      reason text not null,
      approved_by_name text not null,
      from_at timestamptz not null,
      until_on date not null,
      ended_at timestamptz,
      end_reason text
    );
    create index deviations_machine on deviations (machine_id) where ended_at is null;
    create table outbox (
      id uuid primary key default gen_random_uuid(),
      deduplication_key text not null unique,
      change_id uuid references change_requests,
      recipient text not null,
      subject text not null,
      body_text text not null,
      body_html text not null,
      message_id text not null unique,
      state text not null default 'waiting' check (state in ('waiting','sending','sent','given_up')),
      unconfirmed int not null default 0,
      attempts int not null default 0,
      next_try_at timestamptz not null default now(),
      last_error text,
      created_at timestamptz not null default now(),
      sent_at timestamptz
    );
    create index outbox_due on outbox (next_try_at) where state in ('waiting','sending');
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(
    `drop table outbox, deviations, attachments, verifications, lot_machines, lots, dispositions, comments,
      proposal_versions, findings, evaluations, machine_baselines, baselines, change_requests;
     drop sequence change_number`,
  );
}
