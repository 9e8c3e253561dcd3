import { readdirSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import path from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { access, allowed, type Action } from '@/lib/server/access';
import { roles } from '@/lib/inspection/roles';
import { layGround, type Ground } from './access-ground';
import { rows } from './access-rows';
import { startLocalServices } from './local-services';
import { openWorld, PASSWORD } from './world';

const world = openWorld(startLocalServices);
let ground: Ground;
beforeAll(async () => {
  ground = await layGround(world());
});

type Handler = Parameters<ReturnType<typeof world>['call']>[0] & { action?: Action };

/** next-auth answers by itself what belongs to sign-in; it is the only route without the wrapper. */
const notWrapped = new Set(['GET auth/[...nextauth]', 'POST auth/[...nextauth]']);

const api = path.resolve('app/api');
const files = readdirSync(api, { recursive: true, encoding: 'utf8' }).filter((file) =>
  file.endsWith('route.ts'),
);
const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;

async function routes(): Promise<{ name: string; handler: Handler }[]> {
  const found = await Promise.all(
    files.map(async (file) => {
      const exported = (await import(pathToFileURL(path.join(api, file)).href)) as Record<
        string,
        Handler | undefined
      >;
      return methods.flatMap((method) => {
        const handler = exported[method];
        return handler ? [{ name: `${method} ${path.posix.dirname(file)}`, handler }] : [];
      });
    }),
  );
  return found.flat();
}

const closed = ['sign-in-needed', 'not-found', 'not-allowed'];

describe('every route', () => {
  it('has its row here, and its action in the table', async () => {
    const found = await routes();
    expect(found.length).toBeGreaterThan(10);
    const named = found.map(({ name }) => name).filter((name) => !notWrapped.has(name));
    expect(named.sort()).toEqual(Object.keys(rows).sort());
    for (const { name, handler } of found)
      expect({ name, known: (handler.action ?? '') in access }).toEqual({ name, known: true });
  });

  it('asks nobody in without a session, unless it is public', async () => {
    for (const { name, handler } of await wrapped()) {
      const row = rows[name]!({ world: world(), ground, role: 'inspector', person: world().team.inspector });
      const answer = await world().call(handler, row);
      const open = access[handler.action] === 'public';
      expect({ name, status: answer.status }).toEqual({ name, status: open ? 200 : 401 });
    }
  });

  it('asks a disabled person to sign in, whatever the role was', async () => {
    const w = world();
    for (const role of roles) {
      const person = await w.addPerson(w.projectId, role, `disabled.${role}`);
      await w.owner('users').where({ id: person.id }).update({ disabled_at: new Date().toISOString() });
      for (const { name, handler } of await wrapped()) {
        if (access[handler.action] === 'public') continue;
        const row = rows[name]!({ world: w, ground, role, person });
        const { body } = await w.call(handler, { ...row, as: person });
        // A password of somebody who may not sign in is wrong before it is anything else.
        expect({ name, role, code: body.code }).toEqual({
          name,
          role,
          code: JSON.stringify(row.body ?? '').includes(PASSWORD) ? 'wrong-password' : 'sign-in-needed',
        });
      }
    }
  });

  it.each(roles)('holds no member of another project for anything but a stranger: %s', async (role) => {
    const w = world();
    const person = w.otherTeam[role];
    for (const { name, handler } of await wrapped()) {
      if (typeof access[handler.action] === 'string') continue;
      const answer = await w.call(handler, {
        ...rows[name]!({ world: w, ground, role, person }),
        as: person,
      });
      expect({ name, status: answer.status, code: answer.body.code }).toEqual({
        name,
        status: 404,
        code: 'not-found',
      });
    }
  });

  it.each(roles)('does what the table says, and nothing else: %s', async (role) => {
    const w = world();
    for (const { name, handler } of await wrapped()) {
      // A session of its own for each: one of the routes ends them all.
      const person = { ...w.team[role], ...(await w.addSession(w.team[role].id)) };
      const { status, body } = await w.call(handler, {
        ...rows[name]!({ world: w, ground, role, person }),
        as: person,
      });
      if (allowed(handler.action, role)) {
        expect({
          name,
          status,
          code: body.code,
          open: !closed.includes(body.code ?? '') && status < 500,
        }).toMatchObject({
          name,
          open: true,
        });
      } else {
        expect({ name, status, code: body.code }).toEqual({ name, status: 403, code: 'not-allowed' });
      }
    }
  });

  async function wrapped(): Promise<{ name: string; handler: Handler & { action: Action } }[]> {
    return (await routes()).flatMap(({ name, handler }) =>
      notWrapped.has(name) || !handler.action
        ? []
        : [{ name, handler: Object.assign(handler, { action: handler.action }) }],
    );
  }
});
