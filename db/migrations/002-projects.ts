import type { Knex } from 'knex';

/** Projects with their members and registers. Every key of what belongs to a project begins with `project_id`. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table projects (
      id uuid primary key,
      name text not null,
      time_zone text not null,
      place text not null default '',
      created_at timestamptz(3) not null default now()
    );

    -- The one row that writers of a project's record lock: seq and release numbers have no gaps because of it.
    create table project_counters (
      project_id uuid primary key references projects (id),
      last_seq bigint not null default 0,
      last_release_number integer not null default 0
    );

    create table memberships (
      project_id uuid not null references projects (id),
      person_id uuid not null references users (id),
      role text not null check (role in ('inspector', 'superintendent', 'engineer', 'crew', 'coordinator', 'viewer')),
      created_at timestamptz(3) not null default now(),
      removed_at timestamptz(3),
      primary key (project_id, person_id)
    );
    create index memberships_of_person on memberships (person_id) where removed_at is null;

    create table invitations (
      project_id uuid not null references projects (id),
      id uuid not null,
      email text not null,
      role text not null,
      token_digest text not null,
      invited_by uuid not null references users (id),
      created_at timestamptz(3) not null default now(),
      expires_at timestamptz(3) not null,
      accepted_at timestamptz(3),
      primary key (project_id, id)
    );
    create unique index invitations_by_token on invitations (token_digest);

    create table drawings (
      project_id uuid not null references projects (id),
      number text not null,
      revision text not null,
      received_at timestamptz(3) not null,
      title text not null default '',
      primary key (project_id, number, revision)
    );

    create table instruments (
      project_id uuid not null references projects (id),
      id uuid not null,
      name text not null,
      kind text not null,
      serial text not null default '',
      calibration_due timestamptz(3),
      uncertainty_mm double precision,
      in_service boolean not null default true,
      primary key (project_id, id)
    );

    create table mixes (
      project_id uuid not null references projects (id),
      name text not null,
      note text not null default '',
      changed_at timestamptz(3) not null,
      primary key (project_id, name)
    );

    grant select on projects to cagewright_app;
    grant select, insert, update on memberships, invitations, drawings, instruments, mixes, project_counters
      to cagewright_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(
    'drop table mixes, instruments, drawings, invitations, memberships, project_counters, projects',
  );
}
