import type { Knex } from 'knex';

/**
 * The application adds jobs inside its own transactions through this one function: the job queue's tables belong to
 * their owner and are closed to the application's role. The queue's schema itself is installed by graphile-worker's
 * own migrations (scripts/migrate); the body of this function is only resolved when it is called.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function app_add_job(name text, payload json, run_at timestamptz default null, job_key text default null)
      returns void language plpgsql volatile security definer set search_path = public, pg_temp as $$
    begin
      if name not in ('mail', 'verify-photo', 'expire-releases', 'certificate') then
        raise exception 'no such job: %', name;
      end if;
      perform graphile_worker.add_job(
        identifier => name, payload => payload, run_at => coalesce(run_at, now()), max_attempts => 12,
        job_key => job_key);
    end $$;
    revoke all on function app_add_job(text, json, timestamptz, text) from public;
    grant execute on function app_add_job(text, json, timestamptz, text) to cagewright_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop function app_add_job(text, json, timestamptz, text)');
}
