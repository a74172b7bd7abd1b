import type { QueryInterface } from "sequelize";

/** A table with the trigger of this function takes no UPDATE, DELETE or TRUNCATE. */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create function refuse_rewrite() returns trigger language plpgsql as $$
    begin
      raise exception '% is append-only', tg_table_name using errcode = 'restrict_violation';
    end $$;
    create table record_events (
      seq bigserial primary key,
      at timestamptz not null,
      actor_kind text not null check (actor_kind in ('person','token','system')),
      actor_id uuid,
      actor_name text not null,
      action text not null,
      object_type text not null,
      object_id text not null,
      object_label text not null,
      machine_id uuid,
      change_id uuid,
      before jsonb,
      after jsonb,
      reason text,
      previous_hash char(64) not null,
      hash char(64) not null unique
    );
    create index record_events_object on record_events (object_type, object_id, seq desc);
    create index record_events_machine on record_events (machine_id, seq desc) where machine_id is not null;
    create index record_events_change on record_events (change_id, seq desc) where change_id is not null;
    create index record_events_words on record_events
      using gin (to_tsvector('simple', object_label || ' ' || action || ' ' || actor_name || ' ' || coalesce(reason, '')));
    create trigger record_events_append_only before update or delete on record_events
      for each row execute function refuse_rewrite();
    create trigger record_events_no_truncate before truncate on record_events
      for each statement execute function refuse_rewrite();
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query("drop table record_events; drop function refuse_rewrite()");
}
