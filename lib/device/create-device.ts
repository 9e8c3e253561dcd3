import { z } from 'zod';
import { readEntry, type BodyOf, type Entry } from '@/lib/inspection/entry';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import { deviceIndex } from '@/lib/inspection/wire';
import { browserEnvironment } from './browser-environment';
import type { DeviceEnvironment } from './device-environment';
import {
  DeviceError,
  type Device,
  type DevicePerson,
  type DeviceSnapshot,
  type OpenPour,
} from './device-types';
import { exportUnsent } from './export-unsent';
import { PersonWork } from './person-work';
import { PhotoLane } from './photos/photo-lane';
import { emptySnapshot, pourOf, projectOf, snapshotOf } from './snapshot-of';
import { markName, personsMarked, readMark } from './store/high-water-mark';
import { openSettingsStore, type PersonHere, type SettingsStore } from './store/settings-store';
import { askServer } from './sync/ask-server';
import { SyncLane, type LaneState } from './sync/sync-lane';

/** A device that can be put away: tests do, a page never needs to. */
export interface RunningDevice extends Device {
  close(): Promise<void>;
}

const anything = z.object({}).loose();

/**
 * The phone's side: opens the work of whoever used this device last, at once and without a network, and then asks the
 * server who is signed in. Only in a browser, never while a page is rendered.
 * @param env another world than this browser, in tests
 */
export function createDevice(env: DeviceEnvironment = browserEnvironment()): RunningDevice {
  return new FieldDevice(env).asDevice();
}

class FieldDevice {
  #settings: SettingsStore | null = null;
  #deviceId = '';
  #people: PersonHere[] = [];
  #work: PersonWork | null = null;
  #snapshot: DeviceSnapshot = emptySnapshot;
  #opened = new Map<string, { version: number; open: OpenPour }>();
  #version = 0;
  #refreshing: Promise<void> | null = null;
  /** Why it is not known who is signed in; shown while nobody's work is open. */
  #noAnswer: LaneState = { phase: 'idle', message: null };
  #listeners = new Set<() => void>();
  #storage: DeviceSnapshot['storage'] = emptySnapshot.storage;
  #updateReady = false;
  #lostBefore: number | null = null;
  #telling = false;
  #askedToKeep = false;
  #closed = false;
  readonly #urls = new Map<string, string>();
  readonly #lane: SyncLane;
  readonly #photoLane: PhotoLane;
  readonly #stopWaking: () => void;
  readonly #ready: Promise<void>;

  constructor(private readonly env: DeviceEnvironment) {
    this.#lane = new SyncLane(env, {
      work: () => this.#work,
      changed: () => this.#changed(),
      wentThrough: () => void this.#photoLane.run(),
    });
    this.#photoLane = new PhotoLane(env, { work: () => this.#work, sentOne: () => this.#lane.soon() });
    this.#stopWaking = env.onWake(() => this.#lane.wake());
    env.updates?.onReady(() => {
      this.#updateReady = true;
      this.#changed();
    });
    this.#ready = this.#start();
  }

  asDevice(): RunningDevice {
    return {
      snapshot: () => this.#snapshot,
      subscribe: (listener) => {
        this.#listeners.add(listener);
        return () => this.#listeners.delete(listener);
      },
      pour: (pourId) => this.#pour(pourId),
      keepPour: (pourId) => this.#choose(pourId, true),
      dropPour: (pourId) => this.#choose(pourId, false),
      record: async (at, type, body) => {
        const work = await this.#openWork();
        return this.#recorded(await work.record(at, type, body));
      },
      addPhoto: (at, file, photo) => this.#addPhoto(at, file, photo),
      photoAddress: (photoId) => this.#photoAddress(photoId),
      forgetPhoto: async (photoId) => (await this.#openWork()).forgetPhoto(photoId),
      forgetRefused: async (entryId) => (await this.#openWork()).forgetRefused(entryId),
      acknowledgeLost: async () => {
        this.#lostBefore = null;
        await this.#work?.loss.acknowledge();
        this.#changed();
      },
      syncNow: async () => {
        await this.#ready;
        await this.#lane.run();
        await this.#photoLane.run();
      },
      exportUnsent: async () => exportUnsent(await this.#openWork(), this.env.now()),
      confirmSignature: (signatureId, password) => this.#confirm(signatureId, password),
      refreshPerson: async () => {
        await this.#ready;
        await this.#refreshPerson();
      },
      signOut: () => this.#signOut(),
      applyUpdate: () => this.env.updates?.apply(),
      close: () => this.#close(),
    };
  }

  async #start(): Promise<void> {
    const settings = await openSettingsStore(this.env.databaseName('cagewright-device'));
    this.#settings = settings;
    const marked = personsMarked(this.env.marks.names());
    const marks = marked.map((id) => readMark(this.env.marks.read(markName(id))));
    const known = await settings.read('deviceId');
    // An emptied store has forgotten its id; the cookie has not, and order on this device hangs on it.
    this.#deviceId = known ?? marks.find((mark) => mark)?.deviceId ?? this.env.newId();
    if (!known) {
      await settings.write('deviceId', this.#deviceId);
      const lost = marks.reduce((sum, mark) => sum + (mark?.unsent ?? 0), 0);
      this.#lostBefore = lost > 0 ? lost : null;
    }
    this.#people = (await settings.read('people')) ?? [];
    const personId = await settings.read('personId');
    const person = this.#people.find((one) => one.id === personId);
    if (person) await this.#open(person);
    this.#changed();
    void this.#measureStorage();
    void this.#refreshPerson();
  }

  /** Asks the server whose session this is, and opens that person's work. Without an answer the open one stays. */
  #refreshPerson(): Promise<void> {
    this.#refreshing ??= this.#askWhoIsHere().finally(() => {
      this.#refreshing = null;
    });
    return this.#refreshing;
  }

  async #askWhoIsHere(): Promise<void> {
    const answer = await askServer(
      this.env,
      { method: 'GET', path: '/api/sync/index', timeoutMs: 10_000 },
      deviceIndex,
    );
    if (this.#closed) return;
    if (answer.kind === 'answered') {
      const { person } = answer.data;
      if (this.#work?.person.id !== person.id) await this.#open(person);
      this.#lostBefore = null;
      await this.#work?.setIndex(answer.data);
      await this.#work?.setClockOffset(answer.clockOffsetMs);
      this.#lane.heardWhoIsHere();
    } else {
      this.#noAnswer = { phase: answer.phase, message: answer.sentence };
      this.#changed();
    }
    await this.#lane.run();
  }

  async #open(person: DevicePerson): Promise<void> {
    const before = this.#work;
    let opened: PersonWork | null = null;
    const work = await PersonWork.open(this.env, person, this.#deviceId, (wantsSending) => {
      if (opened === null || this.#work !== opened) return;
      if (wantsSending) {
        this.#lane.soon();
        this.env.askForBackgroundSync();
      }
      this.#changed();
    });
    opened = work;
    if (this.#closed) return work.close();
    this.#work = work;
    this.#opened = new Map();
    before?.close();
    this.#lane.personChanged();
    await this.#remember(person);
    this.#changed();
  }

  async #remember(person: DevicePerson): Promise<void> {
    const others = this.#people.filter((one) => one.id !== person.id);
    const { id, name, email } = person;
    this.#people = [...others, { id, name, email, waiting: this.#waiting() }];
    await this.#settings?.write('people', this.#people);
    await this.#settings?.write('personId', id);
  }

  #waiting(): number {
    return (this.#work?.outbox.size ?? 0) + (this.#work?.refused.size ?? 0);
  }

  async #openWork(): Promise<PersonWork> {
    await this.#ready;
    if (!this.#work)
      throw new DeviceError('signed-out', 'Nobody is signed in on this device. Sign in first.');
    return this.#work;
  }

  /** Screens are told once for everything that changed in one go. */
  #changed(): void {
    if (this.#telling || this.#closed) return;
    this.#telling = true;
    queueMicrotask(() => {
      this.#telling = false;
      if (this.#closed) return;
      this.#version += 1;
      this.#snapshot = this.#currentSnapshot();
      this.#listeners.forEach((tell) => tell());
      void this.#noteWaiting();
    });
  }

  #currentSnapshot(): DeviceSnapshot {
    const others = this.#people.filter((one) => one.id !== this.#work?.person.id && one.waiting > 0);
    const common = {
      storage: this.#storage,
      updateReady: this.#updateReady,
      others: others.map(({ id, name, waiting }) => ({ id, name, waiting })),
    };
    if (!this.#work) {
      return {
        ...emptySnapshot,
        ...common,
        sync: { ...emptySnapshot.sync, ...this.#noAnswer, lostEntries: this.#lostBefore },
      };
    }
    return { ...snapshotOf(this.#work, this.#lane.state, this.env.now()), ...common };
  }

  /** The next person at this device is shown whose work waits. */
  async #noteWaiting(): Promise<void> {
    const here = this.#people.find((one) => one.id === this.#work?.person.id);
    const waiting = this.#waiting();
    if (!here || here.waiting === waiting) return;
    this.#people = this.#people.map((one) => (one === here ? { ...here, waiting } : one));
    await this.#settings?.write('people', this.#people).catch(() => undefined);
  }

  #pour(pourId: string): OpenPour | undefined {
    const work = this.#work;
    const project = work?.projectOf(pourId);
    if (!work || !project) return undefined;
    const folded = work.memory.folded(pourId, this.env.now());
    if (!folded) {
      void work.openPour(pourId, project.id).then(
        () => this.#changed(),
        () => undefined,
      );
      return undefined;
    }
    const known = this.#opened.get(pourId);
    const sameSheet = known?.open.sheet === folded.sheet && known.open.holds === folded.holds;
    if (known && sameSheet && known.version === this.#version) return known.open;
    const pour = pourOf(work, project.id, pourId, this.env.now());
    if (!pour) return undefined;
    const open: OpenPour = { pour, project: projectOf(project), ...folded };
    const same =
      known &&
      sameSheet &&
      JSON.stringify([known.open.pour, known.open.project]) === JSON.stringify([pour, open.project]);
    this.#opened.set(pourId, { version: this.#version, open: same ? known.open : open });
    return same ? known.open : open;
  }

  async #choose(pourId: string, keep: boolean): Promise<void> {
    const work = await this.#openWork();
    this.#opened.delete(pourId);
    await work.choose(pourId, keep);
    if (keep) void this.#lane.run();
  }

  #recorded(recorded: RecordedEntry): Entry {
    if (!this.#askedToKeep) {
      this.#askedToKeep = true;
      void this.env.storage.keep().then(
        () => this.#measureStorage(),
        () => undefined,
      );
    }
    const read = readEntry(recorded);
    if (read.kind !== 'known') throw new Error(`An entry of type ${recorded.type} cannot be read back.`);
    return read.entry;
  }

  async #addPhoto(...[at, file, photo]: Parameters<Device['addPhoto']>): Promise<Entry> {
    const work = await this.#openWork();
    const prepared = await this.env.preparePhoto(file);
    const now = this.env.now();
    const shotAt = file instanceof File && file.lastModified > 0 ? Math.min(file.lastModified, now) : now;
    const photoId = this.env.newId();
    const entryId = this.env.newId();
    const body: BodyOf<'photo'> = {
      photoId,
      sha256: prepared.sha256,
      bytes: prepared.bytes.byteLength,
      contentType: prepared.contentType,
      takenAt: new Date(shotAt).toISOString(),
      ...photo,
    };
    const recorded = await work.record(at, 'photo', body, {
      record: { ...body, ...at, entryId, progress: 'waiting', problem: null, sentAt: null, refusals: [] },
      bytes: prepared.bytes,
    });
    void this.#measureStorage();
    return this.#recorded(recorded);
  }

  async #photoAddress(photoId: string): Promise<string | null> {
    const known = this.#urls.get(photoId);
    if (known) return known;
    const work = await this.#openWork();
    const stored = await work.db.get('photoBytes', photoId);
    if (stored) {
      const type = work.photos.get(photoId)?.contentType ?? 'image/jpeg';
      const url = this.env.photoUrl(stored.bytes, type);
      this.#urls.set(photoId, url);
      return url;
    }
    const answer = await askServer(
      this.env,
      { method: 'GET', path: `/api/photos/${photoId}/address` },
      z.object({ url: z.string() }),
    );
    return answer.kind === 'answered' ? answer.data.url : null;
  }

  async #confirm(
    signatureId: string,
    password: string,
  ): Promise<{ ok: true } | { ok: false; sentence: string }> {
    const work = await this.#openWork();
    if (work.outbox.has(signatureId)) await this.#lane.run();
    if (work.outbox.has(signatureId)) {
      const why = this.#lane.state.message ?? 'There is no connection to the server.';
      return { ok: false, sentence: `The signature has not been sent yet. ${why}` };
    }
    const answer = await askServer(
      this.env,
      { method: 'POST', path: `/api/signatures/${signatureId}/confirm`, json: { password } },
      anything,
    );
    if (answer.kind === 'trouble') return { ok: false, sentence: answer.sentence };
    await this.#lane.run();
    return { ok: true };
  }

  async #signOut(): Promise<void> {
    await this.#ready;
    const work = this.#work;
    this.#work = null;
    this.#opened = new Map();
    await this.#settings?.write('personId', null);
    work?.close();
    this.#lane.personChanged();
    this.#changed();
  }

  async #measureStorage(): Promise<void> {
    this.#storage = await this.env.storage.estimate().catch(() => this.#storage);
    this.#changed();
  }

  async #close(): Promise<void> {
    this.#closed = true;
    this.#stopWaking();
    this.#lane.stop();
    this.#photoLane.stop();
    await this.#ready.catch(() => undefined);
    this.#work?.close();
    this.#settings?.close();
  }
}
