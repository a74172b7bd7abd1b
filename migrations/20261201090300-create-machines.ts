import type { QueryInterface } from "sequelize";

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table machines (
      id uuid primary key default gen_random_uuid(),
      serial text not null unique,
      model_id uuid not null references machine_models,
      site_id uuid not null references sites,
      state text not null default 'in_service' check (state in ('in_service','out_of_service','retired')),
      state_reason text not null default '',
      note text not null default '',
      version int not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create index machines_model on machines (model_id);
    create index machines_site on machines (site_id);
    create table machine_hardware (
      id uuid primary key default gen_random_uuid(),
      machine_id uuid not null references machines,
      axis text,
      part text not null,
      item_id uuid references catalog_items,
      data jsonb not null default '{}',
      evidence text not null,
      recorded_by uuid references users,
      recorded_by_name text not null,
      recorded_at timestamptz not null default now(),
      ended_at timestamptz
    );
    create unique index machine_hardware_standing on machine_hardware (machine_id, coalesce(axis, ''), part) where ended_at is null;
    create table file_contents (
      sha256 char(64) primary key,
      size int not null,
      bytes bytea not null,
      created_at timestamptz not null default now()
    );
    create table revisions (
      id uuid primary key default gen_random_uuid(),
      kind text not null check (kind in ('baseline','proposal','as_found','as_left','in_service')),
      model_id uuid not null references machine_models,
      machine_id uuid references machines,
      content_hash char(64) not null,
      created_by_name text not null,
      created_at timestamptz not null default now()
    );
    create index revisions_content on revisions (machine_id, content_hash);
    create table revision_files (
      revision_id uuid not null references revisions,
      position int not null,
      path text not null,
      sha256 char(64) not null references file_contents,
      format text not null,
      encoding text not null check (encoding in ('utf-8','latin-1')),
      bom boolean not null default false,
      primary key (revision_id, position)
    );
    create table revision_parameters (
      id bigserial primary key,
      revision_id uuid not null references revisions,
      machine_id uuid references machines,
      axis text,
      parameter text not null,
      value double precision not null,
      unit text not null,
      basis text check (basis in ('peak','rms')),
      path text not null,
      line int not null,
      raw text not null
    );
    create index revision_parameters_revision on revision_parameters (revision_id);
    create index revision_parameters_search on revision_parameters (parameter, value);
    create trigger revisions_append_only before update or delete on revisions for each row execute function refuse_rewrite();
    create trigger revision_files_append_only before update or delete on revision_files for each row execute function refuse_rewrite();
    create trigger revision_parameters_append_only before update or delete on revision_parameters for each row execute function refuse_rewrite();
    create trigger file_contents_append_only before update or delete on file_contents for each row execute function refuse_rewrite();
    create table readings (
      id uuid primary key default gen_random_uuid(),
      machine_id uuid not null references machines,
      revision_id uuid not null references revisions,
      kind text not null check (kind in ('as_found','as_left','in_service')),
      layer text not null check (layer in ('file','stored','running')),
      read_at timestamptz not null,
      received_at timestamptz not null default now(),
      firmware_version text,
      serial text,
      note text not null default '',
      actor_kind text not null,
      actor_id uuid,
      actor_name text not null
    );
    create index readings_machine on readings (machine_id, read_at desc);
    create trigger readings_append_only before update or delete on readings for each row execute function refuse_rewrite();
    create table machine_status (
      machine_id uuid primary key references machines,
      level text check (level in ('over','near','cannot','within')),
      read boolean not null,
      stale boolean not null default false,
      sentence text not null,
      cells jsonb not null default '{}',
      last_read_at timestamptz,
      computed_at timestamptz not null
    );
    create table drift_items (
      id uuid primary key default gen_random_uuid(),
      machine_id uuid not null references machines,
      position int not null,
      axis text,
      parameter text not null,
      kind text not null check (kind in ('differs','not_read','stale')),
      required_value double precision,
      actual_value double precision,
      unit text not null,
      layer text,
      share double precision,
      level text not null,
      sentence text not null,
      unique (machine_id, position)
    );
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(
    "drop table drift_items, machine_status, readings, revision_parameters, revision_files, revisions, file_contents, machine_hardware, machines",
  );
}
