import type { Knex } from 'knex';

/** Tables that belong to a project, with the column that says which. */
const projectTables: [table: string, column: string][] = [
  ['projects', 'id'],
  ['project_counters', 'project_id'],
  ['memberships', 'project_id'],
  ['invitations', 'project_id'],
  ['drawings', 'project_id'],
  ['instruments', 'project_id'],
  ['mixes', 'project_id'],
  ['pours', 'project_id'],
  ['assignments', 'project_id'],
  ['plans', 'project_id'],
  ['pour_summaries', 'project_id'],
  ['nonconformance_summaries', 'project_id'],
  ['entries', 'project_id'],
  ['photos', 'project_id'],
  ['releases', 'project_id'],
];

/**
 * Row-level security: the second wall. A transaction names its session (or, for a job, its one project); from then on
 * the application's role sees and writes rows of those projects only. The set of projects is looked up once and kept
 * for the transaction, so that a query pays for one array comparison and keeps its indexes.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function app_projects() returns uuid[] language sql stable as $$
      select coalesce(string_to_array(nullif(current_setting('app.projects', true), ''), ',')::uuid[], '{}')
    $$;

    -- Who is behind a session, as of now; no row when it is unknown, over, revoked, or its person disabled.
    create function app_enter(wanted uuid)
      returns table (person_id uuid, session_id uuid, name text, email text, licence text, memberships jsonb)
      language plpgsql volatile security definer set search_path = public, pg_temp as $$
    declare
      found_person users%rowtype;
      roles jsonb;
      projects text;
    begin
      select u.* into found_person from sessions s join users u on u.id = s.person_id
        where s.id = wanted and s.revoked_at is null and s.expires_at > now() and u.disabled_at is null;
      if not found then return; end if;
      select coalesce(jsonb_object_agg(m.project_id, m.role), '{}'), coalesce(string_agg(m.project_id::text, ','), '')
        into roles, projects
        from memberships m where m.person_id = found_person.id and m.removed_at is null;
      perform set_config('app.person_id', found_person.id::text, true);
      perform set_config('app.projects', projects, true);
      -- Once in five minutes is enough, and no request waits for another one's note of it.
      update sessions set last_seen_at = now() where id in (
        select s.id from sessions s where s.id = wanted and s.last_seen_at < now() - interval '5 minutes'
        for update skip locked);
      return query select found_person.id, wanted, found_person.name, found_person.email, found_person.licence, roles;
    end $$;

    -- For jobs and the public release page: one project, no person.
    create function app_enter_project(wanted uuid) returns void language sql volatile as $$
      select set_config('app.person_id', '', true), set_config('app.projects', wanted::text, true)
    $$;

    -- The only question that can be asked of a release without a session.
    create function app_release_by_token(wanted text)
      returns table (project_id uuid, pour_id uuid, number integer)
      language sql stable security definer set search_path = public, pg_temp as $$
      select r.project_id, r.pour_id, r.number from releases r where r.token = wanted
    $$;

    -- Which pours have a release whose validity is over and not yet written as void.
    create function app_releases_due(at timestamptz)
      returns table (project_id uuid, pour_id uuid)
      language sql stable security definer set search_path = public, pg_temp as $$
      select s.project_id, s.pour_id from pour_summaries s where s.state = 'released' and s.valid_until <= at
    $$;

    -- Which projects there are, for commands that walk the whole record.
    create function app_all_projects() returns setof uuid
      language sql stable security definer set search_path = public, pg_temp as $$
      select id from projects order by id
    $$;

    revoke all on function app_enter(uuid), app_enter_project(uuid), app_release_by_token(text),
      app_releases_due(timestamptz), app_all_projects() from public;
    grant execute on function app_enter(uuid), app_enter_project(uuid), app_release_by_token(text),
      app_releases_due(timestamptz), app_all_projects() to cagewright_app;
  `);
  for (const [table, column] of projectTables) {
    await knex.raw(`
      alter table ${table} enable row level security;
      alter table ${table} force row level security;
      create policy own_projects on ${table} to cagewright_app
        using (${column} = any ((select app_projects())::uuid[]))
        with check (${column} = any ((select app_projects())::uuid[]));
      create policy owner_sees_all on ${table} to current_user using (true) with check (true);
    `);
  }
}

export async function down(knex: Knex): Promise<void> {
  for (const [table] of projectTables) {
    await knex.raw(`
      drop policy own_projects on ${table};
      drop policy owner_sees_all on ${table};
      alter table ${table} no force row level security;
      alter table ${table} disable row level security;
    `);
  }
  await knex.raw(`
    drop function app_enter(uuid), app_enter_project(uuid), app_release_by_token(text),
      app_releases_due(timestamptz), app_all_projects(), app_projects()
  `);
}
