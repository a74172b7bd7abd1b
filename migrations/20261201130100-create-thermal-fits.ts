import type { QueryInterface } from "sequelize";

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table thermal_fits (
      machine_id uuid not null references machines,
      axis text not null,
      field text not null check (field in ('winding_to_ambient_k_per_w','case_to_ambient_k_per_w')),
      catalog_k_per_w double precision not null check (catalog_k_per_w > 0),
      value_k_per_w double precision not null check (value_k_per_w > 0),
      low_k_per_w double precision not null,
      high_k_per_w double precision not null,
      readings int not null,
      fitted_at timestamptz not null,
      primary key (machine_id, axis, field),
      check (low_k_per_w <= value_k_per_w and value_k_per_w <= high_k_per_w)
    );
    create index verifications_machine on verifications (machine_id, at);
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query("drop index verifications_machine; drop table thermal_fits");
}
