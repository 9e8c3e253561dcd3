import type { PushResponse } from '@/lib/inspection/wire';
import type { Bench, Line } from '../bench';
import { figure, median, ratioRow } from '../row';
import { batchesOf, BenchDevice } from '../world/readings';
import { sendFromNode } from '../world/send-batches';
import { ask, plannedSite } from '../world/site';

const READINGS = 10_000;
const THIRTY_DAYS = { pours: 10, faces: 4, pointsOfFace: 250 };

/**
 * The route that takes batches in, with session, validation, access, chain and summaries, against the bare inserts,
 * both driven from here; then the same history once more.
 */
export const pushRoute: Line = async (bench) => {
  const rounds = [];
  for (let round = 0; round < bench.rounds; round += 1) rounds.push(await oneRound(bench));
  const perSecond = (times: number[]) => (READINGS / median(times)) * 1000;
  const first = perSecond(rounds.map((round) => round.first));
  const again = perSecond(rounds.map((round) => round.again));
  const added = Math.max(...rounds.map((round) => round.added));
  return [
    ratioRow({
      work: 'push route, batches of 500',
      unit: 'readings/s',
      ours: first,
      peer: perSecond(rounds.map((round) => round.bare)),
      peerName: 'H',
      atLeast: 0.5,
    }),
    {
      work: 'the same history pushed again',
      measured: `${figure(again)} readings/s, ${added} added`,
      peer: `first time ${figure(first)} readings/s`,
      ratio: figure(again / first),
      target: 'at least 1, none added',
      reached: again >= first && added === 0,
    },
  ];
};

async function oneRound({ product }: Bench) {
  const site = await plannedSite(product, THIRTY_DAYS);
  const { inspector } = site.people;
  const toBare = (body: string) => fetch(product.bare, { method: 'POST', body });
  const toRoute = (body: string) => ask(product, inspector, '/api/sync/push', body);
  const bare = await sendFromNode(toBare, batchesOf(new BenchDevice(site).allReadings()));
  const bodies = batchesOf(new BenchDevice(site).allReadings());
  const first = await sendFromNode<PushResponse>(toRoute, bodies);
  const again = await sendFromNode<PushResponse>(toRoute, bodies);
  const kept = (answers: PushResponse[]) =>
    answers.flatMap(({ outcomes }) => outcomes).filter(({ outcome }) => outcome === 'kept').length;
  if (kept(first.answers) !== READINGS) throw new Error(`Only ${kept(first.answers)} readings were kept.`);
  return { bare: bare.ms, first: first.ms, again: again.ms, added: kept(again.answers) };
}
