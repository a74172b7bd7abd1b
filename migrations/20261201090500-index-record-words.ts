import type { QueryInterface } from "sequelize";

const words = (action: string) =>
  `to_tsvector('simple', object_label || ' ' || ${action} || ' ' || actor_name || ' ' || coalesce(reason, ''))`;

/** Takes acts apart at their dots, so that "approved" finds "change.approved"; and indexes acts and instants. */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    drop index record_events_words;
    create index record_events_words on record_events using gin (${words("translate(action, '._', '  ')")});
    create index record_events_action on record_events (action text_pattern_ops, seq desc);
    create index record_events_at on record_events (at);
    create index record_events_actor on record_events (actor_id, seq desc) where actor_id is not null;
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    drop index record_events_actor, record_events_at, record_events_action, record_events_words;
    create index record_events_words on record_events using gin (${words("action")});
  `);
}
