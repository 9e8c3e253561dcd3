import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { entryEnvelope, isEntryType } from '@/lib/inspection/entry';
import { bodies } from '@/lib/inspection/entry-bodies';
import type { CrewList } from '@/lib/inspection/fix-list-item';
import type { Plan } from '@/lib/inspection/plan';
import type { Role } from '@/lib/inspection/roles';
import {
  pullRequest,
  pushRequest,
  type DeviceIndex,
  type PullRequest,
  type PullResponse,
  type PushOutcome,
  type PushResponse,
  type StoredEntry,
} from '@/lib/inspection/wire';

export interface ModelPerson {
  id: string;
  name: string;
  role: Role;
}

export interface ModelPour {
  id: string;
  number: string;
  plan: Plan;
  plannedAt?: string;
}

/** What makes this server wrong on purpose, for negative controls. */
export interface ModelFlaws {
  /** Inserts whatever comes, known id or not. */
  naiveInsert?: boolean;
  /** Does not ask whether the entries of a batch are its sender's own. */
  takesFromAnybody?: boolean;
}

const envelopeKeys = Object.keys(entryEnvelope.shape);
const canonical = (value: unknown): string => canonicalize(value) ?? '';
/** What of an entry is compared and hashed: the envelope as received. */
export const contentOf = (entry: object): string =>
  canonical(Object.fromEntries(Object.entries(entry).filter(([key]) => envelopeKeys.includes(key))));

/**
 * A server in memory that keeps the protocol to the letter and nothing else: one project, one record. What the real
 * one adds (access, the fold, PostgreSQL) has its own tests; what the phone may rely on is here.
 */
export class ModelServer {
  entries: StoredEntry[] = [];
  photos = new Map<string, Uint8Array>();
  /** What crew are given of a pour, by its id. */
  crewLists = new Map<string, CrewList>();
  /** In whose session each entry came that was kept. */
  readonly sentBy = new Map<string, string>();
  pageSize = 1000;
  clockMs: () => number;
  #session: ModelPerson | null;
  #signedInAt: string;
  readonly projectId: string;
  readonly pours: ModelPour[];
  readonly people: ModelPerson[];
  readonly flaws: ModelFlaws;

  constructor(given: {
    projectId: string;
    pours: ModelPour[];
    people: ModelPerson[];
    clockMs: () => number;
    flaws?: ModelFlaws;
  }) {
    this.projectId = given.projectId;
    this.pours = given.pours;
    this.people = given.people;
    this.clockMs = given.clockMs;
    this.#session = given.people[0] ?? null;
    this.#signedInAt = new Date(given.clockMs()).toISOString();
    this.flaws = given.flaws ?? {};
  }

  /** Who the session cookie stands for; null: signed out. Setting it is signing in: another session, begun later. */
  get session(): ModelPerson | null {
    return this.#session;
  }

  set session(person: ModelPerson | null) {
    this.#session = person;
    this.#signedInAt = new Date(Date.parse(this.#signedInAt) + 1).toISOString();
  }

  /** A copy of the record, to restore later. */
  backup(): StoredEntry[] {
    return [...this.entries];
  }

  restore(backup: StoredEntry[]): void {
    this.entries = [...backup];
  }

  /** Writes an entry as the server itself does (a photo stored, say), or as somebody does elsewhere. */
  writes(
    pourId: string | null,
    type: string,
    body: StoredEntry['body'],
    by: Pick<ModelPerson, 'id' | 'role'> | undefined = this.people[0],
  ): StoredEntry {
    const number = this.entries.length + 1;
    return this.#seal(
      {
        id: `99999999-0000-7000-8000-${String(number).padStart(12, '0')}`,
        projectId: this.projectId,
        pourId,
        type,
        v: 1,
        body,
        planRevision: 1,
        authorId: by?.id ?? '',
        deviceId: '99999999-0000-7000-8000-ffffffffffff',
        deviceSeq: number,
        recordedAt: this.#now(),
        clockOffsetMs: 0,
        seenSeq: number - 1,
      },
      by?.role ?? 'viewer',
    );
  }

  /** Answers one request; `Response` like a real one. */
  async handle(address: string, init: RequestInit, session = this.session): Promise<Response> {
    const path = new URL(address, 'http://phone.example.test').pathname;
    if (path.startsWith('/store/')) return this.#put(path, init);
    if (!session) return json(401, { code: 'sign-in-needed', sentence: 'Sign in to go on.' });
    if (path === '/api/sync/index') return json(200, this.#index(session));
    if (path === '/api/sync/push') return json(200, this.#push(session, await bodyOf(init)));
    if (path === '/api/sync/pull') return json(200, this.#pull(session, await bodyOf(init)));
    const photo = /^\/api\/photos\/([^/]+)\/(upload-address|uploaded|address)$/.exec(path);
    if (photo) return this.#photo(session, photo[1] ?? '', photo[2] ?? '');
    if (/^\/api\/signatures\/[^/]+\/confirm$/.test(path)) {
      const { password } = (await bodyOf(init)) as { password: string };
      return password === 'right'
        ? json(200, {})
        : json(403, { code: 'wrong-password', sentence: 'That password is not right. Nothing was signed.' });
    }
    return json(404, { code: 'not-found', sentence: 'There is nothing here that you can see.' });
  }

  #now(): string {
    return new Date(this.clockMs()).toISOString();
  }

  #index(person: ModelPerson): DeviceIndex {
    return {
      serverTime: this.#now(),
      person: { id: person.id, name: person.name, email: `${person.name.toLowerCase()}@example.test` },
      signedInAt: this.#signedInAt,
      projects: [
        {
          id: this.projectId,
          name: 'Ferry landing',
          timeZone: 'Etc/UTC',
          role: person.role,
          people: this.people,
          pours: this.pours.map(({ id, number, plan, plannedAt }) => ({
            id,
            number,
            title: 'Quay deck',
            location: 'grids C to D',
            plannedAt: plannedAt ?? null,
            planRevision: plan.revision,
            assigned: true,
            state: 'held',
            holds: 1,
          })),
        },
      ],
    };
  }

  #push(person: ModelPerson, raw: unknown): PushResponse {
    const request = pushRequest.parse(raw);
    const outcomes = request.entries.map((one) => this.#takeIn(person, one));
    return { serverTime: this.#now(), outcomes };
  }

  #takeIn(person: ModelPerson, raw: unknown): PushOutcome {
    const parsed = entryEnvelope.safeParse(raw);
    if (!parsed.success)
      return { id: '', outcome: 'refused', code: 'invalid', sentence: 'It cannot be read.' };
    const envelope = parsed.data;
    const { id } = envelope;
    const known = this.entries.find((one) => one.id === id);
    if (known && !this.flaws.naiveInsert) {
      if (contentOf(known) === contentOf(envelope))
        return { id, outcome: 'known', receipt: receiptOf(known) };
      return { id, outcome: 'refused', code: 'id-reused', sentence: 'Another entry has this id.' };
    }
    if (envelope.authorId !== person.id && !this.flaws.takesFromAnybody)
      return { id, outcome: 'refused', code: 'wrong-author', sentence: 'It was recorded by somebody else.' };
    if (JSON.stringify(envelope.body).includes('poison') || !isEntryType(envelope.type))
      return { id, outcome: 'refused', code: 'invalid', sentence: 'This cannot be used.', field: 'text' };
    if (!bodies[envelope.type].safeParse(envelope.body).success)
      return { id, outcome: 'refused', code: 'invalid', sentence: 'This cannot be read.' };
    const sealed = this.#seal(envelope, person.role);
    this.sentBy.set(id, person.id);
    return { id, outcome: 'kept', receipt: receiptOf(sealed) };
  }

  #seal(
    envelope: Omit<StoredEntry, 'seq' | 'receivedAt' | 'authorRole' | 'prevHash' | 'hash'>,
    role: Role,
  ): StoredEntry {
    const seq = (this.entries.at(-1)?.seq ?? 0) + 1;
    const prevHash = this.entries.findLast((one) => one.pourId === envelope.pourId)?.hash ?? null;
    const receivedAt = this.#now();
    const hash = createHash('sha256')
      .update(contentOf(envelope) + seq + receivedAt + prevHash)
      .digest('hex');
    const sealed: StoredEntry = { ...envelope, seq, receivedAt, authorRole: role, prevHash, hash };
    this.entries.push(sealed);
    return sealed;
  }

  #pull(person: ModelPerson, raw: unknown): PullResponse {
    const request: PullRequest = pullRequest.parse(raw);
    return {
      serverTime: this.#now(),
      project: {
        ...this.#page(null, request.project),
        ...(person.role === 'crew' && nothingOf(request.project)),
      },
      pours: request.pours.map((cursor) => {
        const pour = this.pours.find((one) => one.id === cursor.pourId);
        if (person.role === 'crew') return this.#pullForCrew(person, cursor, pour !== undefined);
        return {
          pourId: cursor.pourId,
          found: pour !== undefined,
          plan: pour && pour.plan.revision > cursor.planRevision ? pour.plan : null,
          ...this.#page(cursor.pourId, cursor),
        };
      }),
    };
  }

  #pullForCrew(
    person: ModelPerson,
    cursor: PullRequest['pours'][number],
    found: boolean,
  ): PullResponse['pours'][number] {
    const { pourId } = cursor;
    const page = this.#page(pourId, cursor);
    const list = this.crewLists.get(pourId);
    return {
      pourId,
      found,
      plan: null,
      crewList: list && list.digest !== cursor.crewList ? list : null,
      ...page,
      entries: page.entries.filter((entry) => entry.authorId === person.id),
    };
  }

  #page(pourId: string | null, cursor: { after: number; headHash: string | null }): PullResponse['project'] {
    const stream = this.entries.filter((one) => one.pourId === pourId);
    const at = stream.find((one) => one.seq === cursor.after);
    const headKnown = cursor.after === 0 || at?.hash === cursor.headHash;
    const rest = headKnown ? stream.filter((one) => one.seq > cursor.after) : [];
    const entries = rest.slice(0, this.pageSize);
    const last = entries.at(-1);
    return {
      entries,
      head: last?.seq ?? cursor.after,
      headHash: last?.hash ?? cursor.headHash,
      more: rest.length > entries.length,
      headKnown,
    };
  }

  async #put(path: string, init: RequestInit): Promise<Response> {
    this.photos.set(
      path.slice('/store/'.length),
      new Uint8Array(await new Response(init.body).arrayBuffer()),
    );
    return new Response('', { status: 200 });
  }

  #photo(person: ModelPerson, photoId: string, verb: string): Response {
    const entry = this.entries.find((one) => one.type === 'photo' && one.body.photoId === photoId);
    if (!entry?.pourId) return json(404, { code: 'not-found', sentence: 'There is no such photo.' });
    if (verb !== 'address' && entry.authorId !== person.id)
      return json(403, {
        code: 'not-allowed',
        sentence: 'Only the person who took a photograph sends it.',
      });
    if (verb === 'upload-address') {
      return json(200, {
        url: `/store/${photoId}`,
        headers: { 'content-type': 'image/jpeg' },
        expiresAt: this.#now(),
      });
    }
    if (verb === 'address') return json(200, { url: `/store/${photoId}?signed` });
    // As the real one does: what is found of a photo is written under the name of who took it.
    const author = { id: entry.authorId, role: entry.authorRole };
    const bytes = this.photos.get(photoId);
    const stored = this.entries.some((one) => one.type === 'photo-stored' && one.body.photoId === photoId);
    if (stored) return json(200, {});
    const sha256 = bytes ? createHash('sha256').update(bytes).digest('hex') : null;
    if (sha256 === entry.body.sha256) {
      const { bytes: length = 1, contentType = '' } = entry.body;
      this.writes(
        entry.pourId,
        'photo-stored',
        {
          photoId,
          key: `photos/${sha256}`,
          sha256,
          bytes: length,
          contentType,
          widthPx: 4,
          heightPx: 3,
        },
        author,
      );
    } else {
      this.writes(
        entry.pourId,
        'photo-refused',
        {
          photoId,
          problem: 'The bytes are not those that were recorded.',
        },
        author,
      );
    }
    return json(200, {});
  }
}

/** Crew are given nothing of the project's own stream, and their cursor stays where it is. */
const nothingOf = ({ after, headHash }: PullRequest['project']) => ({
  entries: [],
  head: after,
  headHash,
  more: false,
});

const receiptOf = ({ seq, receivedAt, authorRole, prevHash, hash }: StoredEntry) => ({
  seq,
  receivedAt,
  authorRole,
  prevHash,
  hash,
});

const json = (status: number, body: unknown): Response =>
  new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });

/** The JSON of a request, unpacked where it came packed. */
export async function bodyOf(init: RequestInit): Promise<unknown> {
  const packed = new Headers(init.headers).get('content-encoding') === 'gzip';
  const body = new Response(init.body).body;
  if (!body) return undefined;
  const plain = packed ? body.pipeThrough(new DecompressionStream('gzip')) : body;
  return new Response(plain).json();
}
