import type { Knex } from 'knex';

/** The record itself: entries and plans that are only ever added, the photos and the releases that they speak of. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table entries (
      project_id uuid not null references projects (id),
      seq bigint not null check (seq > 0),
      id uuid not null,
      pour_id uuid,
      type text not null,
      v integer not null,
      body jsonb not null,
      plan_revision integer not null,
      author_id uuid not null references users (id),
      author_role text not null,
      device_id uuid not null,
      device_seq bigint not null,
      recorded_at timestamptz(3) not null,
      clock_offset_ms bigint,
      seen_seq bigint not null,
      received_at timestamptz(3) not null,
      prev_hash text,
      hash text not null,
      primary key (project_id, seq),
      unique (project_id, id),
      foreign key (project_id, pour_id) references pours (project_id, id)
    );
    create index entries_of_stream on entries (project_id, pour_id, seq);

    create table photos (
      project_id uuid not null,
      id uuid not null,
      pour_id uuid not null,
      entry_id uuid not null,
      author_id uuid not null references users (id),
      sha256 text not null,
      bytes integer not null,
      content_type text not null,
      state text not null default 'waiting' check (state in ('waiting', 'stored', 'refused')),
      object_key text,
      width_px integer,
      height_px integer,
      problem text,
      created_at timestamptz(3) not null default now(),
      settled_at timestamptz(3),
      primary key (project_id, id),
      foreign key (project_id, pour_id) references pours (project_id, id),
      foreign key (project_id, entry_id) references entries (project_id, id)
    );
    create index photos_by_id on photos (id);
    create index photos_of_pour on photos (project_id, pour_id);

    create table releases (
      project_id uuid not null,
      number integer not null check (number > 0),
      entry_id uuid not null,
      pour_id uuid not null,
      token text not null,
      released_by uuid not null references users (id),
      released_at timestamptz(3) not null,
      valid_until timestamptz(3) not null,
      void_entry_id uuid,
      voided_at timestamptz(3),
      void_reason text,
      primary key (project_id, number),
      unique (project_id, entry_id),
      foreign key (project_id, pour_id) references pours (project_id, id),
      foreign key (project_id, entry_id) references entries (project_id, id)
    );
    create unique index releases_by_token on releases (token);
    create index releases_of_pour on releases (project_id, pour_id, number);

    create function refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception '% is append-only: % refused', tg_table_name, tg_op using errcode = 'insufficient_privilege';
    end $$;
    create trigger entries_append_only before update or delete on entries
      for each row execute function refuse_change();
    create trigger entries_no_truncate before truncate on entries
      for each statement execute function refuse_change();
    create trigger plans_append_only before update or delete on plans
      for each row execute function refuse_change();
    create trigger plans_no_truncate before truncate on plans
      for each statement execute function refuse_change();

    grant select, insert on entries to cagewright_app;
    grant select, insert, update on photos to cagewright_app;
    grant select, insert on releases to cagewright_app;
    grant update (void_entry_id, voided_at, void_reason) on releases to cagewright_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table releases, photos, entries;
    drop trigger plans_append_only on plans;
    drop trigger plans_no_truncate on plans;
    drop function refuse_change();
  `);
}
