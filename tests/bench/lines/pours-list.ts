import type { Bench, Line } from '../bench';
import { figure, median } from '../row';
import { ask, emptySite, type Site } from '../world/site';

const FEW = 50;
const MANY = 5000;
const TIMES = 15;

/**
 * Fills a project with pours, their summaries and their entries without going through the product, which would take
 * hours; the list reads nothing of an entry's content.
 */
async function fill({ product }: Bench, site: Site, pours: number, entriesOfPour: number): Promise<void> {
  const { projectId, people } = site;
  const { database } = product;
  // Three pours a week: what lies ahead is the same for both lists, whatever lies behind.
  await database.query(
    `insert into pours (project_id, id, number, title, location, planned_at, plan_revision, created_by)
     select $1, gen_random_uuid(), 'P-' || n, 'Quay deck, bay ' || n, 'Grid C to D',
       now() + (25 - n) * interval '56 hours', 1, $2 from generate_series(1, $3::int) as n`,
    [projectId, people.engineer.id, pours],
  );
  await database.query(
    `insert into pour_summaries (project_id, pour_id, state, holds_total, holds_by_role, not_met, readings,
       points_read, points_total, plan_revision, head_seq, fold_version)
     select project_id, id, 'held', 4, '{"inspector": 3, "engineer": 1}', 1, 40, 40, 48, 1, 40, 2
     from pours where project_id = $1`,
    [projectId],
  );
  await database.query(
    `insert into entries (project_id, seq, id, pour_id, type, v, body, plan_revision, author_id, author_role,
       device_id, device_seq, recorded_at, clock_offset_ms, seen_seq, received_at, prev_hash, hash)
     select $1, row_number() over (), gen_random_uuid(), p.id, 'reading', 1, '{"faceId": "face-1", "value": 46}',
       1, $2, 'inspector', $1, k, now(), 0, 0, now(), null, repeat('0', 64)
     from pours p cross join generate_series(1, $3::int) as k where p.project_id = $1`,
    [projectId, people.inspector.id, entriesOfPour],
  );
}

async function pageOf({ product }: Bench, site: Site): Promise<number> {
  const started = performance.now();
  const answer = await ask(product, site.people.coordinator, '/pours');
  const html = await answer.text();
  if (!answer.ok || !html.includes('P-25')) throw new Error(`The list answered ${answer.status}.`);
  return performance.now() - started;
}

/** The office's list of pours in a large project against the same page in a small one. */
export const poursList: Line = async (bench) => {
  const few = await emptySite(bench.product);
  const many = await emptySite(bench.product);
  await fill(bench, few, FEW, bench.scale);
  await fill(bench, many, MANY, bench.scale);
  await bench.product.database.query('analyze');
  const times = { few: [] as number[], many: [] as number[] };
  for (let time = -3; time < TIMES; time += 1) {
    const [small, large] = [await pageOf(bench, few), await pageOf(bench, many)];
    if (time < 0) continue;
    times.few.push(small);
    times.many.push(large);
  }
  const [small, large] = [median(times.few), median(times.many)];
  return [
    {
      work: `list of pours, ${MANY.toLocaleString('en-GB')} pours with ${(MANY * bench.scale).toLocaleString('en-GB')} entries`,
      measured: `${figure(large)} ms`,
      peer: `with ${FEW} pours ${figure(small)} ms`,
      ratio: figure(large / small),
      target: 'at most 2',
      reached: large / small <= 2,
    },
  ];
};
