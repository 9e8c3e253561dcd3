import type { z } from 'zod';
import { AppError, type FieldProblem } from '@/lib/inspection/app-error';
import type { Role } from '@/lib/inspection/roles';
import { enterSession, type Person } from '@/db/stores/session-store';
import { database, type Tx } from '@/db/connection';
import { access, allowed, type Action } from './access';
import { checkPassword } from './check-password';
import { errorResponse } from './error-response';
import { logger } from './logger';
import { readBody } from './read-body';
import { requireSameOrigin } from './same-origin';
import { addressOf, claimOfRequest, type SessionClaim } from './session';

/** What every step of a route is given. */
export interface Call<P, Q, B> {
  tx: Tx;
  person: Person;
  params: P;
  query: Q;
  body: B;
  /** The server's clock when the request was taken up, ISO 8601. */
  now: string;
}

/** What a role decides about is loaded first, and always belongs to one project. */
export interface Loaded {
  projectId: string;
}

export interface RouteSpec<P, Q, B, L extends Loaded | undefined, R> {
  action: Action;
  params?: z.ZodType<P>;
  query?: z.ZodType<Q>;
  body?: z.ZodType<B>;
  /** Lists the fields of the answer: nothing else leaves. */
  response: z.ZodType<R>;
  /** Status of a success, 200 unless told. */
  status?: number;
  /** Bytes of body taken, 256 kB unless told. */
  mostBytes?: number;
  /** The password to be confirmed before anything else happens; it is checked outside of the transaction. */
  password?: (body: B) => string;
  /** Loads what is asked about; @throws AppError not-found. Needed where the action is a matter of role. */
  load?: (call: Call<P, Q, B>) => Promise<L>;
  /**
   * Decides and persists. A thrown error undoes everything; a returned AppError is answered as such, and what was
   * written stays (a refused attempt goes on record).
   */
  run: (call: Call<P, Q, B> & { loaded: L; role: RoleFor<L> }) => Promise<R | AppError>;
}

/** What was loaded belongs to a project, in which the person holds a role; without, there is none. */
type RoleFor<L> = L extends Loaded ? Role : null;

/** A route handler that tells which action it is, so that a test can walk all of them. */
export interface RouteHandler {
  (request: Request, context: { params: Promise<Record<string, string | string[]>> }): Promise<Response>;
  action: Action;
}

/**
 * The one shape of a request: session, parse, transaction opened to the person's projects, load, authorise about what
 * was loaded, decide, persist, present.
 */
export function handleRoute<
  P = unknown,
  Q = unknown,
  B = unknown,
  L extends Loaded | undefined = undefined,
  R = unknown,
>(spec: RouteSpec<P, Q, B, L, R>): RouteHandler {
  const handler = async (
    request: Request,
    context: { params: Promise<Record<string, string | string[]>> },
  ): Promise<Response> => {
    const started = performance.now();
    const event = { route: spec.action, method: request.method };
    try {
      const write = request.method !== 'GET' && request.method !== 'HEAD';
      if (write) requireSameOrigin(request);
      const claim = await claimOfRequest(request);
      if (!claim && access[spec.action] !== 'public') throw new AppError('sign-in-needed');

      const params = parse(spec.params, await context.params);
      const query = parse(spec.query, Object.fromEntries(new URL(request.url).searchParams));
      const body = parse(
        spec.body,
        spec.body ? await readBody(request, spec.mostBytes ?? 262_144) : undefined,
      );
      if (spec.password && claim) await confirmPassword(claim, spec.password(body), request);

      const outcome = await database().transaction(async (tx) => {
        const call = {
          tx,
          params,
          query,
          body,
          now: new Date().toISOString(),
          person: await enter(tx, claim, spec.action),
        };
        const loaded = (await spec.load?.(call)) as L;
        const role = authorise(spec.action, call.person, loaded) as RoleFor<L>;
        return spec.run({ ...call, loaded, role });
      });
      if (outcome instanceof AppError) return errorResponse(outcome, event);

      const answer = Response.json(spec.response.parse(outcome), { status: spec.status ?? 200 });
      const ms = Math.round(performance.now() - started);
      logger[write ? 'info' : 'debug']({ event: 'answered', ...event, personId: claim?.personId, ms });
      return answer;
    } catch (error) {
      return errorResponse(error, event);
    }
  };
  return Object.assign(handler, { action: spec.action });
}

/** Nobody: only public routes are called for this person. */
const nobody: Person = { id: '', sessionId: '', name: '', email: '', licence: '', roles: new Map() };

async function enter(tx: Tx, claim: SessionClaim | null, action: Action): Promise<Person> {
  if (access[action] === 'public') return nobody;
  const person = claim ? await enterSession(tx, claim.sessionId) : null;
  if (!person) throw new AppError('sign-in-needed');
  return person;
}

/** The person's role in the project of what was loaded. Of a project that is not theirs, nothing exists. */
function authorise(action: Action, person: Person, loaded: Loaded | undefined): Role | null {
  const who: readonly Role[] | 'public' | 'session' = access[action];
  if (typeof who === 'string') return null;
  const role = loaded ? person.roles.get(loaded.projectId) : undefined;
  if (!role) throw new AppError('not-found');
  if (!allowed(action, role)) throw new AppError('not-allowed');
  return role;
}

async function confirmPassword(claim: SessionClaim, password: string, request: Request): Promise<void> {
  const person = await checkPassword({ personId: claim.personId }, password, addressOf(request.headers));
  if (!person) {
    throw new AppError('wrong-password', undefined, {
      fields: [{ path: 'password', message: 'This is not your password.' }],
    });
  }
}

function parse<T>(schema: z.ZodType<T> | undefined, value: unknown): T {
  // Without a schema nothing is handed on, whatever was sent.
  if (!schema) return undefined as T;
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new AppError('invalid', undefined, { fields: problemsOf(parsed.error) });
}

/** The problems of a schema as fields with their messages. */
export const problemsOf = (error: z.ZodError): FieldProblem[] =>
  error.issues.slice(0, 50).map((issue) => ({ path: issue.path.join('.'), message: issue.message }));
