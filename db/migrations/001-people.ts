import type { Knex } from 'knex';

/**
 * People, their sessions and devices, and the tries at signing in. The application connects as `cagewright_app`, a
 * role without ownership: what it may do to each table is granted table by table. Its password is set by whoever
 * runs the database, never here.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    do $$ begin
      if not exists (select from pg_roles where rolname = 'cagewright_app') then
        create role cagewright_app login nosuperuser nocreatedb nocreaterole noinherit nobypassrls;
      end if;
    end $$;

    create table users (
      id uuid primary key,
      email text not null,
      name text not null,
      password_hash text not null,
      licence text not null default '',
      certification text not null default '',
      locale text not null default 'en',
      created_at timestamptz(3) not null default now(),
      disabled_at timestamptz(3)
    );
    create unique index users_by_email on users (lower(email));

    create table sessions (
      id uuid primary key,
      person_id uuid not null references users (id),
      created_at timestamptz(3) not null default now(),
      last_seen_at timestamptz(3) not null default now(),
      expires_at timestamptz(3) not null,
      revoked_at timestamptz(3),
      user_agent text not null default '',
      address text not null default ''
    );
    create index sessions_of_person on sessions (person_id, last_seen_at desc);

    create table devices (
      id uuid not null,
      person_id uuid not null references users (id),
      name text not null default '',
      first_sent_at timestamptz(3) not null default now(),
      last_sent_at timestamptz(3) not null default now(),
      highest_device_seq bigint not null default 0,
      primary key (person_id, id)
    );

    create table sign_in_attempts (
      id bigint generated always as identity primary key,
      person_key text not null,
      address text not null,
      at timestamptz(3) not null default now(),
      succeeded boolean not null
    );
    create index sign_in_attempts_by_person on sign_in_attempts (person_key, at);
    create index sign_in_attempts_by_address on sign_in_attempts (address, at);

    grant usage on schema public to cagewright_app;
    grant select, insert on users to cagewright_app;
    grant update (name, password_hash, licence, certification, locale, disabled_at) on users to cagewright_app;
    grant select, insert, update on sessions, devices to cagewright_app;
    grant select, insert, delete on sign_in_attempts to cagewright_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table sign_in_attempts, devices, sessions, users');
}
