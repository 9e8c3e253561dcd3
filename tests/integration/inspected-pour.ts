import { pointsOf, pushKept } from './record-routes';
import { PASSWORD, type Answer, type TestDevice, type World } from './world';

/** Everything that the quay deck asks for, met: readings at all points, both checks. */
export async function inspect(world: World, pourId: string, phone: TestDevice): Promise<void> {
  const points = await pointsOf(world, pourId);
  const readings = points.map((point) => {
    const faceId = point.slice(0, point.indexOf('.'));
    return phone.reading(point, 52, {}, { faceId });
  });
  const answers = ['bars', 'clean'].map((checkId) => phone.entry('answer', { checkId, answer: 'met' }));
  await pushKept(world, phone, [...readings, ...answers]);
}

/** The last `seq` that the server has written in a pour. */
export async function headSeq(world: World, pourId: string): Promise<number> {
  const { GET } = await import('@/app/api/pours/[pourId]/live/route');
  const answer = await world.call(GET, { as: world.team.inspector, params: { pourId } });
  return Number(answer.body.headSeq);
}

/**
 * Inspector and superintendent sign in sight of everything, and confirm with their passwords.
 * @param elementIds what they sign for, the whole pour unless told
 */
export async function sign(world: World, pourId: string, elementIds: string[] | null = null): Promise<void> {
  const { POST } = await import('@/app/api/signatures/[signatureId]/confirm/route');
  for (const as of ['inspector', 'superintendent'] as const) {
    const person = world.team[as];
    const device = world.device(person, pourId);
    const body = { as, elementIds, words: 'As listed', strokes: [], sheetDigest: 'a'.repeat(64) };
    const signature = device.entry('signature', body, { seenSeq: await headSeq(world, pourId) });
    await pushKept(world, device, [signature]);
    const params = { signatureId: signature.id };
    const confirmed = await world.call(POST, { as: person, params, body: { password: PASSWORD } });
    if (confirmed.status !== 201) throw new Error(`not confirmed: ${JSON.stringify(confirmed.body)}`);
  }
}

export async function askRelease(
  world: World,
  pourId: string,
  elementIds: string[] | null = null,
): Promise<Answer> {
  const { POST } = await import('@/app/api/pours/[pourId]/release/route');
  const scope = { elementIds, limits: elementIds === null ? '' : 'Bulkhead at grid D' };
  return world.call(POST, { as: world.team.superintendent, params: { pourId }, body: { scope } });
}

export interface Given {
  releaseId: string;
  number: number;
  token: string;
}

/** @throws Error naming what stands in the way */
export async function release(
  world: World,
  pourId: string,
  elementIds: string[] | null = null,
): Promise<Given> {
  const given = await askRelease(world, pourId, elementIds);
  if (given.status !== 201) throw new Error(`no release: ${JSON.stringify(given.body)}`);
  return given.body as unknown as Given;
}
