import type { Entry } from '@/lib/inspection/entry';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import { browserEnvironment } from './browser-environment';
import { confirmSignature } from './confirm-signature';
import type { DeviceEnvironment } from './device-environment';
import {
  DeviceError,
  type Device,
  type DeviceSnapshot,
  type StoreState,
  type SyncState,
} from './device-types';
import { loadSchemas } from './load-schemas';
import { OpenedPours } from './opened-pours';
import { DeviceHolder } from './people/device-holder';
import type { PersonWork } from './person-work';
import { DevicePhotos } from './photos/device-photos';
import { PhotoLane } from './photos/photo-lane';
import { emptySnapshot, snapshotOf } from './snapshot-of';
import { deviceIdOf } from './store/device-id';
import { unlessFull } from './store/person-database';
import { openSettingsStore, type SettingsStore } from './store/settings-store';
import { askServer } from './sync/ask-server';
import { SyncLane, type LaneState } from './sync/sync-lane';

/** A device that can be put away: tests do, a page never needs to. */
export interface RunningDevice extends Device {
  close(): Promise<void>;
}

/** Whoever has just signed in is told by the server; so long is waited before the device asks who is holding it. */
const ASK_AFTER_MS = 1_500;

/**
 * The phone's side: opens the work of whoever holds this device, at once and without a network, or asks who that is;
 * and then asks the server whose session it has. Only in a browser, never while a page is rendered.
 * @param env another world than this browser, in tests
 */
export function createDevice(env: DeviceEnvironment = browserEnvironment()): RunningDevice {
  return new FieldDevice(env).asDevice();
}

class FieldDevice {
  #settings: SettingsStore | null = null;
  #snapshot: DeviceSnapshot = emptySnapshot;
  #store: StoreState = 'reading';
  #version = 0;
  #refreshing: Promise<void> | null = null;
  /** Nobody's work opened by itself, and the server had its chance to say who has just signed in. */
  #asks = false;
  /** Why it is not known who is signed in; shown while nobody's work is open. */
  #noAnswer: LaneState = { phase: 'idle', message: null, signedInAs: null };
  #listeners = new Set<() => void>();
  #storage: DeviceSnapshot['storage'] = emptySnapshot.storage;
  #updateReady = false;
  #lostBefore: Pick<SyncState, 'lostEntries' | 'lostPhotos'> | null = null;
  #telling = false;
  #askedToKeep = false;
  #closed = false;
  readonly #holder: DeviceHolder;
  readonly #pours = new OpenedPours();
  readonly #photos: DevicePhotos;
  readonly #lane: SyncLane;
  readonly #photoLane: PhotoLane;
  readonly #stopWaking: () => void;
  readonly #ready: Promise<void>;

  constructor(private readonly env: DeviceEnvironment) {
    this.#photos = new DevicePhotos(env);
    this.#holder = new DeviceHolder(env, {
      changed: () => this.#changed(),
      wantsSending: () => {
        this.#lane.soon();
        env.askForBackgroundSync();
      },
      personChanged: () => {
        this.#pours.forget();
        this.#lane.personChanged();
      },
      followed: () => void this.#lane.run(),
    });
    this.#lane = new SyncLane(env, {
      work: () => this.#holder.work,
      changed: () => this.#changed(),
      wentThrough: () => void this.#photoLane.run(),
      heardSession: (index) => void this.#holder.noteSession(index).catch(() => undefined),
    });
    this.#photoLane = new PhotoLane(env, {
      work: () => this.#holder.work,
      ownSession: (work) => this.#lane.ownSession(work),
      sentOne: () => this.#lane.soon(),
    });
    this.#stopWaking = env.onWake(() => this.#lane.wake());
    env.updates?.onReady(() => {
      this.#updateReady = true;
      this.#changed();
    });
    this.#ready = this.#start();
    this.#ready.catch(() => this.#storeIs('failed'));
  }

  asDevice(): RunningDevice {
    return {
      snapshot: () => this.#snapshot,
      subscribe: (listener) => {
        this.#listeners.add(listener);
        return () => this.#listeners.delete(listener);
      },
      pour: (pourId) =>
        this.#holder.work
          ? this.#pours.get(this.#holder.work, pourId, {
              version: this.#version,
              now: this.env.now(),
              read: () => this.#changed(),
            })
          : undefined,
      pourFailed: (pourId) => this.#pours.failed(pourId),
      keepPour: (pourId) => this.#choose(pourId, true),
      dropPour: (pourId) => this.#choose(pourId, false),
      record: async (at, type, body) => {
        const work = await this.#openWork();
        return this.#recorded(await work.record(at, type, body));
      },
      addPhoto: async (at, file, photo) => {
        const recorded = await this.#photos.add(await this.#openWork(), at, file, photo);
        void this.#measureStorage();
        return this.#recorded(recorded);
      },
      photoAddress: async (photoId) => this.#photos.address(await this.#openWork(), photoId),
      forgetPhoto: async (photoId) => (await this.#openWork()).forgetPhoto(photoId),
      forgetRefused: async (entryId) => (await this.#openWork()).forgetRefused(entryId),
      acknowledgeLost: async () => {
        this.#lostBefore = null;
        await this.#holder.work?.loss.acknowledge();
        this.#changed();
      },
      syncNow: async () => {
        await this.#ready;
        await this.#lane.run();
        await this.#photoLane.run();
      },
      exportUnsent: async () => {
        const [{ exportUnsent }, work] = await Promise.all([import('./export-unsent'), this.#openWork()]);
        return exportUnsent(work, this.env.now());
      },
      confirmSignature: async (signatureId, password) =>
        confirmSignature(this.env, await this.#openWork(), this.#lane, { signatureId, password }),
      refreshPerson: async () => {
        await this.#ready;
        await this.#refreshPerson();
      },
      handOver: async () => {
        await this.#ready;
        await this.#holder.handOver();
      },
      openPerson: async (personId, pin) => {
        await this.#ready;
        const answer = await this.#holder.openPerson(personId, pin);
        // Not asked who is signed in: whoever has given the PIN holds the device, whatever session comes up meanwhile.
        if (answer.ok) void this.#lane.run();
        return answer;
      },
      setPin: async (pin, current) => {
        await this.#ready;
        return this.#holder.setPin(pin, current);
      },
      applyUpdate: () => this.env.updates?.apply(),
      close: () => this.#close(),
    };
  }

  async #start(): Promise<void> {
    const settings = await openSettingsStore(this.env.databaseName('cagewright-device'));
    this.#settings = settings;
    const { deviceId, lost } = await deviceIdOf(this.env, settings);
    this.#lostBefore = lost;
    await this.#holder.start(settings, deviceId);
    if (!this.#holder.work) this.env.after(ASK_AFTER_MS, () => this.#ask());
    this.#storeIs('open');
    void this.#measureStorage();
    void this.#refreshPerson();
  }

  #storeIs(store: StoreState): void {
    this.#store = store;
    this.#changed();
  }

  #ask(): void {
    this.#asks = true;
    this.#changed();
  }

  /** Asks the server whose session it has. A session begun since opens that person's work; else the open one stays. */
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
      'deviceIndex',
    );
    if (this.#closed) return;
    if (answer.kind === 'answered') {
      const { data, clockOffsetMs } = answer;
      // A full device cannot note whose session it is; it sends all the same, and that makes room.
      await this.#holder.heard(data).catch(unlessFull);
      this.#lostBefore = null;
      this.#noAnswer = { phase: 'idle', message: null, signedInAs: null };
      const { work } = this.#holder;
      if (work?.person.id === data.person.id) {
        try {
          await work.setIndex(data);
          await work.setClockOffset(clockOffsetMs);
          this.#lane.heardWhoIsHere(data.person.id);
        } catch (error) {
          // The device was handed over in the middle of it: there is nobody left to tell.
          if (!work.closed) throw error;
        }
      }
    } else {
      this.#noAnswer = { phase: answer.phase, message: answer.sentence, signedInAs: null };
    }
    this.#ask();
    await this.#lane.run();
  }

  /**
   * The work of the person whose screens are shown. A device that has changed hands since does nothing in the name of
   * the next one.
   */
  async #openWork(): Promise<PersonWork> {
    const shown = this.#snapshot.person?.id;
    await this.#ready.catch(() => {
      throw new DeviceError(
        'store-failed',
        'The store of this device did not open. What was kept is still in it. Load this page again.',
      );
    });
    const work = this.#holder.need();
    if (shown !== undefined && work.person.id !== shown) {
      throw new DeviceError(
        'signed-out',
        'This device has changed hands meanwhile. This was not kept; enter it again.',
      );
    }
    return work;
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
      void this.#holder.noteWaiting();
    });
  }

  #currentSnapshot(): DeviceSnapshot {
    const { work } = this.#holder;
    const shown = this.#holder.shown();
    const common = {
      ...shown,
      store: this.#store,
      deviceId: this.#holder.deviceId,
      storage: this.#storage,
      updateReady: this.#updateReady,
      asks: !work && this.#asks && shown.people.length > 0,
    };
    if (!work) {
      return {
        ...emptySnapshot,
        ...common,
        sync: { ...emptySnapshot.sync, ...this.#noAnswer, ...this.#lostBefore },
      };
    }
    return { ...snapshotOf(work, this.#lane.state, this.env.now()), ...common };
  }

  async #choose(pourId: string, keep: boolean): Promise<void> {
    const work = await this.#openWork();
    this.#pours.forget(pourId);
    await work.choose(pourId, keep);
    if (keep) void this.#lane.run();
  }

  async #recorded(recorded: RecordedEntry): Promise<Entry> {
    if (!this.#askedToKeep) {
      this.#askedToKeep = true;
      void this.env.storage.keep().then(
        () => this.#measureStorage(),
        () => undefined,
      );
    }
    const { readEntry } = await loadSchemas();
    const read = readEntry(recorded);
    if (read.kind !== 'known') throw new Error(`An entry of type ${recorded.type} cannot be read back.`);
    return read.entry;
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
    this.#holder.close();
    this.#settings?.close();
  }
}
