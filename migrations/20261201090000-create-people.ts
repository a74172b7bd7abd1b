import type { QueryInterface } from "sequelize";

const ROLES = "('viewer','technician','engineer','approver','admin')";

export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table users (
      id uuid primary key default gen_random_uuid(),
      email text not null unique check (email = lower(email)),
      name text not null,
      role text not null check (role in ${ROLES}),
      password_hash text not null,
      active boolean not null default true,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create table sessions (
      id uuid primary key default gen_random_uuid(),
      user_id uuid not null references users,
      created_at timestamptz not null default now(),
      expires_at timestamptz not null,
      ended_at timestamptz,
      end_reason text
    );
    create index sessions_open on sessions (user_id) where ended_at is null;
    create table sign_in_failures (
      id bigserial primary key,
      email text not null,
      at timestamptz not null default now()
    );
    create index sign_in_failures_recent on sign_in_failures (email, at);
    create table tokens (
      id uuid primary key default gen_random_uuid(),
      name text not null,
      role text not null check (role in ${ROLES}),
      scopes text[] not null,
      token_hash char(64) not null unique,
      hint text not null,
      owner_id uuid not null references users,
      created_at timestamptz not null default now(),
      expires_at timestamptz not null,
      revoked_at timestamptz,
      last_used_at timestamptz
    );
    create table idempotency_keys (
      actor_id uuid not null,
      key text not null,
      request_hash char(64) not null,
      status int not null,
      answer jsonb not null,
      created_at timestamptz not null default now(),
      primary key (actor_id, key)
    );
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query("drop table idempotency_keys, tokens, sign_in_failures, sessions, users");
}
