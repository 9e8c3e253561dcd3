import type { Knex } from 'knex';

/** Pours, their plans, who is assigned to them, and the derived summaries that lists are drawn from. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table pours (
      project_id uuid not null references projects (id),
      id uuid not null,
      number text not null,
      title text not null,
      location text not null,
      planned_at timestamptz(3),
      -- Pours without a planned time come last; a column of its own lets one index serve the list page by page.
      planned_order timestamptz(3) not null generated always as (coalesce(planned_at, 'infinity'::timestamptz)) stored,
      plan_revision integer not null default 0,
      created_by uuid not null references users (id),
      created_at timestamptz(3) not null default now(),
      primary key (project_id, id),
      unique (project_id, number)
    );
    create index pours_by_id on pours (id);
    create index pours_by_time on pours (project_id, planned_order, id);

    create table assignments (
      project_id uuid not null,
      pour_id uuid not null,
      person_id uuid not null references users (id),
      created_at timestamptz(3) not null default now(),
      primary key (project_id, pour_id, person_id),
      foreign key (project_id, pour_id) references pours (project_id, id)
    );
    create index assignments_of_person on assignments (person_id, project_id);

    create table plans (
      project_id uuid not null,
      pour_id uuid not null,
      revision integer not null check (revision > 0),
      document jsonb not null,
      digest text not null,
      author_id uuid not null references users (id),
      reason text not null,
      issued_at timestamptz(3) not null,
      primary key (project_id, pour_id, revision),
      foreign key (project_id, pour_id) references pours (project_id, id)
    );

    -- Derived: dropped and rebuilt from plans and entries by one command.
    create table pour_summaries (
      project_id uuid not null,
      pour_id uuid not null,
      state text not null,
      holds_total integer not null,
      holds_by_role jsonb not null,
      not_met integer not null,
      readings integer not null,
      points_read integer not null,
      points_total integer not null,
      release_id uuid,
      release_number integer,
      valid_until timestamptz(3),
      plan_revision integer not null,
      head_seq bigint not null,
      fold_version integer not null,
      primary key (project_id, pour_id),
      foreign key (project_id, pour_id) references pours (project_id, id)
    );
    create index pour_summaries_by_state on pour_summaries (project_id, state);
    create index pour_summaries_valid_until on pour_summaries (valid_until) where state = 'released';

    create table nonconformance_summaries (
      project_id uuid not null,
      id uuid not null,
      pour_id uuid not null,
      seq bigint not null,
      title text not null,
      status text not null,
      where_text text not null,
      extent text not null,
      proposal text not null,
      needed_by timestamptz(3),
      raised_by uuid not null,
      raised_at timestamptz(3) not null,
      photos integer not null,
      conditions_open integer not null,
      primary key (project_id, id),
      foreign key (project_id, pour_id) references pours (project_id, id)
    );
    create index nonconformance_summaries_of_pour on nonconformance_summaries (project_id, pour_id);
    create index nonconformance_summaries_by_seq on nonconformance_summaries (project_id, seq desc);

    grant select, insert, update on pours to cagewright_app;
    grant select, insert, delete on assignments to cagewright_app;
    grant select, insert on plans to cagewright_app;
    grant select, insert, update, delete on pour_summaries, nonconformance_summaries to cagewright_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table nonconformance_summaries, pour_summaries, plans, assignments, pours');
}
