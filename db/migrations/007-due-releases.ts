import type { Knex } from 'knex';

/**
 * Which pours have a release whose validity is over and not yet written as void. A pour in two parts has two releases,
 * and its summary speaks of the later one: the releases themselves are asked. A summary says `released` as of the last
 * write, and that write has voided what was over by then, so nothing is missed by looking at those alone.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create or replace function app_releases_due(at timestamptz)
      returns table (project_id uuid, pour_id uuid)
      language sql stable security definer set search_path = public, pg_temp as $$
      select s.project_id, s.pour_id from pour_summaries s
      where s.state = 'released' and exists (
        select from releases r
        where r.project_id = s.project_id and r.pour_id = s.pour_id
          and r.void_entry_id is null and r.valid_until <= at)
    $$;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    create or replace function app_releases_due(at timestamptz)
      returns table (project_id uuid, pour_id uuid)
      language sql stable security definer set search_path = public, pg_temp as $$
      select s.project_id, s.pour_id from pour_summaries s where s.state = 'released' and s.valid_until <= at
    $$;
  `);
}
