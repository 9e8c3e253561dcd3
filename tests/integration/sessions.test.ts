import { describe, expect, it } from 'vitest';
import { PASSWORD, openWorld, type TestPerson } from './world';

const world = openWorld();

const index = async (as: Pick<TestPerson, 'cookie'> | null) => {
  const { GET } = await import('@/app/api/sync/index/route');
  return world().call(GET, { as });
};

describe('a session', () => {
  it('is ended everywhere at once by sign-out everywhere', async () => {
    const w = world();
    const person = await w.addPerson(w.projectId, 'inspector', 'signs.out');
    const phone = await w.addSession(person.id);
    expect((await index(phone)).status).toBe(200);
    const { POST } = await import('@/app/api/account/sign-out-everywhere/route');
    expect(await w.call(POST, { as: person, body: {} })).toMatchObject({ status: 200, body: { ended: 2 } });
    for (const session of [person, phone]) {
      expect(await index(session)).toMatchObject({ status: 401, body: { code: 'sign-in-needed' } });
    }
  });

  it('of a disabled person, and one that is over, ends with the next request', async () => {
    const w = world();
    const disabled = await w.addPerson(w.projectId, 'inspector', 'is.disabled');
    await w.owner('users').where({ id: disabled.id }).update({ disabled_at: new Date().toISOString() });
    expect((await index(disabled)).status).toBe(401);
    const late = await w.addPerson(w.projectId, 'inspector', 'is.late');
    await w
      .owner('sessions')
      .where({ id: late.sessionId })
      .update({ expires_at: new Date(0).toISOString() });
    expect((await index(late)).status).toBe(401);
  });

  it('loses a project with the membership, while the rest goes on', async () => {
    const w = world();
    const person = await w.addPerson(w.projectId, 'inspector', 'is.removed');
    await w
      .owner('memberships')
      .insert({ project_id: w.otherProjectId, person_id: person.id, role: 'viewer' });
    const ids = async () =>
      ((await index(person)).body.projects as { id: string }[]).map((project) => project.id).sort();
    expect(await ids()).toEqual([w.projectId, w.otherProjectId].sort());
    await w
      .owner('memberships')
      .where({ project_id: w.projectId, person_id: person.id })
      .update({ removed_at: new Date().toISOString() });
    expect(await ids()).toEqual([w.otherProjectId]);
  });

  it('cannot be made up: another secret, another session, a cut token', async () => {
    const w = world();
    const { encode } = await import('next-auth/jwt');
    const { sessionCookies, sessionToken } = await import('@/lib/server/session');
    const name = sessionCookies().sessionToken.name;
    const claim = { personId: w.team.engineer.id, sessionId: w.team.engineer.sessionId };
    const forged = await encode({
      token: { sub: claim.personId, sessionId: claim.sessionId },
      secret: 'another secret',
    });
    const unknown = await sessionToken({ ...claim, sessionId: w.projectId });
    const cut = (await sessionToken(claim)).slice(0, -3);
    for (const token of [forged, unknown, cut, '']) {
      expect((await index({ cookie: `${name}=${token}` })).status).toBe(401);
    }
  });
});

describe('a password', () => {
  const check = async (email: string, password: string, address: string, now?: Date) =>
    (await import('@/lib/server/check-password')).checkPassword({ email }, password, address, now);

  it('is the person’s own, whatever the case of the address; never somebody else’s', async () => {
    const { engineer } = world().team;
    expect(await check(engineer.email.toUpperCase(), PASSWORD, '198.51.100.1')).toMatchObject({
      id: engineer.id,
    });
    expect(await check(engineer.email, `${PASSWORD}.`, '198.51.100.1')).toBeNull();
    expect(await check('nobody@example.test', PASSWORD, '198.51.100.1')).toBeNull();
  });

  it('is kept as argon2id, and tries of it never', async () => {
    const w = world();
    const user = await w.owner('users').where({ id: w.team.engineer.id }).first('password_hash');
    expect(user.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    const rows = await w.owner('sign_in_attempts').select('*');
    expect(JSON.stringify(rows)).not.toContain(PASSWORD);
    expect(JSON.stringify(rows)).not.toContain(w.team.engineer.email);
  });

  it('is not even looked at after five wrong ones, until the window has passed', async () => {
    const { viewer } = world().team;
    for (let tries = 0; tries < 5; tries += 1)
      expect(await check(viewer.email, 'wrong', `192.0.2.${tries}`)).toBeNull();
    await expect(check(viewer.email, PASSWORD, '192.0.2.77')).rejects.toMatchObject({ code: 'too-many' });
    const later = new Date(Date.now() + 16 * 60_000);
    expect(await check(viewer.email, PASSWORD, '192.0.2.77', later)).toMatchObject({ id: viewer.id });
  });

  it('cannot be tried on many people from one address', async () => {
    const address = '203.0.113.9';
    for (let tries = 0; tries < 30; tries += 1) await check(`guess${tries}@example.test`, 'wrong', address);
    await expect(check('guess99@example.test', 'wrong', address)).rejects.toMatchObject({ code: 'too-many' });
    expect(await check(world().team.crew.email, PASSWORD, '203.0.113.10')).not.toBeNull();
  });

  it('asked again for a signature is throttled with the same count', async () => {
    const w = world();
    const { POST } = await import('@/app/api/signatures/[signatureId]/confirm/route');
    const params = { signatureId: w.gaugeId };
    const as = w.team.superintendent;
    for (let tries = 0; tries < 5; tries += 1) {
      const answer = await w.call(POST, { as, params, body: { password: 'wrong' } });
      expect(answer).toMatchObject({ status: 403, body: { code: 'wrong-password' } });
    }
    expect(await w.call(POST, { as, params, body: { password: PASSWORD } })).toMatchObject({
      status: 429,
      body: { code: 'too-many' },
    });
  });
});
