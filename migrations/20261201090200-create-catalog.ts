import type { QueryInterface } from "sequelize";

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table sites (
      id uuid primary key default gen_random_uuid(),
      code text not null unique,
      name text not null,
      ambient_c double precision,
      version int not null default 1,
      retired_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    alter table users add column site_id uuid references sites;
    create table catalog_items (
      id uuid primary key default gen_random_uuid(),
      kind text not null check (kind in ('motor','driver','controller_board','supply','drive_train','mount')),
      code text not null,
      name text not null,
      version int not null default 1,
      retired_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (kind, code)
    );
    create table catalog_versions (
      item_id uuid not null references catalog_items,
      version int not null,
      name text not null,
      data jsonb not null,
      evidence text not null default '',
      created_by uuid references users,
      created_by_name text not null,
      created_at timestamptz not null default now(),
      primary key (item_id, version)
    );
    create trigger catalog_versions_append_only before update or delete on catalog_versions
      for each row execute function refuse_rewrite();
    create table machine_models (
      id uuid primary key default gen_random_uuid(),
      code text not null unique,
      name text not null,
      version int not null default 1,
      retired_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create table machine_model_versions (
      id uuid primary key default gen_random_uuid(),
      model_id uuid not null references machine_models,
      version int not null,
      supply_id uuid references catalog_items,
      controller_board_id uuid references catalog_items,
      enclosure_rise_k double precision,
      has_read_back boolean not null default true,
      created_by uuid references users,
      created_by_name text not null,
      created_at timestamptz not null default now(),
      unique (model_id, version)
    );
    create table axes (
      model_version_id uuid not null references machine_model_versions,
      position int not null,
      axis text not null,
      motor_count int not null default 1,
      motor_id uuid references catalog_items,
      driver_id uuid references catalog_items,
      drive_train_id uuid references catalog_items,
      mount_id uuid references catalog_items,
      load jsonb not null default '{}',
      travel_mm double precision,
      travel_deg double precision,
      coupled_with text[] not null default '{}',
      primary key (model_version_id, position),
      unique (model_version_id, axis)
    );
    create trigger machine_model_versions_append_only before update or delete on machine_model_versions
      for each row execute function refuse_rewrite();
    create trigger axes_append_only before update or delete on axes for each row execute function refuse_rewrite();
    create table key_tables (
      id uuid primary key default gen_random_uuid(),
      model_id uuid not null references machine_models,
      version int not null,
      rules jsonb not null,
      note text not null default '',
      created_by uuid references users,
      created_by_name text not null,
      created_at timestamptz not null default now(),
      unique (model_id, version)
    );
    create trigger key_tables_append_only before update or delete on key_tables
      for each row execute function refuse_rewrite();
    create table policies (
      version int primary key,
      data jsonb not null,
      note text not null default '',
      created_by uuid references users,
      created_by_name text not null,
      created_at timestamptz not null default now()
    );
    create trigger policies_append_only before update or delete on policies
      for each row execute function refuse_rewrite();
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(
    "alter table users drop column site_id; drop table policies, key_tables, axes, machine_model_versions, machine_models, catalog_versions, catalog_items, sites",
  );
}
