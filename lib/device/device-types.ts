import type { BodyOf, Entry } from '@/lib/inspection/entry';
import type { SubjectRef, siteBodies, projectBodies } from '@/lib/inspection/entry-bodies';
import type { CrewList } from '@/lib/inspection/fix-list-item';
import type { Role } from '@/lib/inspection/roles';
import type { Hold, PourState, Sheet } from '@/lib/inspection/sheet-types';
import type { refusalCodes } from '@/lib/inspection/wire';
import type { PinStanding } from './people/pin-guard';
import type { WaitingHere } from './store/settings-store';

/** Types that a device may queue. */
export type DeviceEntryType = keyof typeof siteBodies | keyof typeof projectBodies;

export interface DevicePerson {
  id: string;
  name: string;
  email: string;
}

/** Somebody who has signed in on this device: what of theirs waits, and how their PIN stands. */
export interface PersonOnDevice {
  id: string;
  name: string;
  waiting: WaitingHere;
  pin: PinStanding;
}

/** What became of a PIN: taken, or why not, in a sentence. */
export type PinAnswer =
  | { ok: true }
  | {
      ok: false;
      reason: 'wrong' | 'wait' | 'closed' | 'no-pin' | 'unfit';
      sentence: string;
      /** No try is taken before this time of the device's clock, ms. */
      waitUntil: number | null;
    };

/** A project of the person, as last heard from the server. */
export interface DeviceProject {
  id: string;
  name: string;
  timeZone: string;
  role: Role;
  people: { id: string; name: string; role: Role }[];
}

/** A pour in the list: kept on the device, or only heard of. */
export interface DevicePour {
  id: string;
  projectId: string;
  number: string;
  title: string;
  location: string;
  plannedAt: string | null;
  kept: boolean;
  /** Plan revision on the device (0: none) and on the server as last heard. */
  planRevision: number;
  serverPlanRevision: number;
  state: PourState;
  holds: number;
  notSent: number;
}

export type SyncPhase =
  'idle' | 'sending' | 'fetching' | 'offline' | 'sign-in-needed' | 'server-trouble' | 'strange-network';

export interface SyncState {
  phase: SyncPhase;
  /** A sentence for people: what is going on and what was kept. Null when there is nothing to say. */
  message: string | null;
  lastSuccessAt: string | null;
  waitingEntries: number;
  refusedEntries: number;
  waitingPhotos: number;
  oldestWaitingAt: string | null;
  /** Server's clock minus this device's, ms; null when never known. */
  clockOffsetMs: number | null;
  /** Entries made here that the store no longer holds and the server never confirmed (evicted); null: none known. */
  lostEntries: number | null;
  /** Photos made here that were evicted before they were sent, though the server has their entries; null: none known. */
  lostPhotos: number | null;
  /** Whose session the server has, where it is another person's: then nothing of this person's is sent. */
  signedInAs: string | null;
}

export interface RefusedEntry {
  entry: Entry;
  code: (typeof refusalCodes)[number];
  sentence: string;
  field: string | null;
  at: string;
}

export type PhotoProgress = 'waiting' | 'sending' | 'sent' | 'stored' | 'refused';
export interface QueuedPhoto {
  photoId: string;
  pourId: string;
  about: SubjectRef;
  caption: string;
  shot: BodyOf<'photo'>['shot'];
  bytes: number;
  takenAt: string;
  progress: PhotoProgress;
  problem: string | null;
}

/** A pour opened on the device: the same fold and the same holds as on the server, pending entries included. */
export interface OpenPour {
  pour: DevicePour;
  project: DeviceProject;
  sheet: Sheet | null;
  holds: Hold[];
  state: PourState;
  /** For crew, who have no sheet: what to put right, and their own entries here. Null for everybody else. */
  crew: CrewPour | null;
}

/** What crew have of a pour. */
export interface CrewPour {
  /** Null until it was fetched. */
  list: CrewList | null;
  /** Highest `seq` that the list rests on. */
  headSeq: number;
  own: Entry[];
}

/** What is on this device: being read still, open, or out of reach because the store did not open. */
export type StoreState = 'reading' | 'open' | 'failed';

export interface DeviceSnapshot {
  /** Until it is `open`, nothing below says that something is not there. */
  store: StoreState;
  /** Names this device in the entries that are made on it; empty until the store is open. */
  deviceId: string;
  person: DevicePerson | null;
  projects: DeviceProject[];
  pours: DevicePour[];
  sync: SyncState;
  refused: RefusedEntry[];
  photos: QueuedPhoto[];
  storage: { usedBytes: number | null; quotaBytes: number | null; persisted: boolean | null };
  /** A new version of the application waits to take over. */
  updateReady: boolean;
  /** Everybody who has signed in on this device, latest first; the person whose work is open among them. */
  people: PersonOnDevice[];
  /** Nobody's work is open, and the device asks who is holding it. */
  asks: boolean;
  /** The open person's PIN on this device: is there one, and must it be given to choose another? */
  pin: { set: boolean; needsCurrent: boolean };
}

/** The phone's side, as components/field uses it. Every promise of `record` resolves only once the entry is on disk. */
export interface Device {
  snapshot(): DeviceSnapshot;
  subscribe(listener: () => void): () => void;
  /** The opened pour as last folded; undefined while it is being read from the store. */
  pour(pourId: string): OpenPour | undefined;
  /** The pour did not open: a piece of the program is missing, or its store cannot be read. Loading the page tries again. */
  pourFailed(pourId: string): boolean;
  keepPour(pourId: string): Promise<void>;
  dropPour(pourId: string): Promise<void>;
  /**
   * Writes an entry and its outbox record in one strict transaction, then folds it in.
   * @throws DeviceError when the body is invalid (with fields) or the store refuses (device full)
   */
  record<T extends DeviceEntryType>(
    at: { projectId: string; pourId: string | null },
    type: T,
    body: BodyOf<T>,
  ): Promise<Entry>;
  /** Compresses, stores the bytes with their digest, and records the `photo` entry. */
  addPhoto(
    at: { projectId: string; pourId: string },
    file: Blob,
    photo: { about: SubjectRef; shot: BodyOf<'photo'>['shot']; caption: string },
  ): Promise<Entry>;
  /** An address for showing a photo: the local bytes while they are here, the server's short-lived address otherwise. */
  photoAddress(photoId: string): Promise<string | null>;
  /** Deletes the bytes of a photo that was refused, so that it can be taken again. */
  forgetPhoto(photoId: string): Promise<void>;
  /** Drops a refused entry from the tray once its author has amended or exported it. */
  forgetRefused(entryId: string): Promise<void>;
  syncNow(): Promise<void>;
  /** Everything not sent, as one file. */
  exportUnsent(): Promise<Blob>;
  /** Confirms a signature with the password, online. */
  confirmSignature(
    signatureId: string,
    password: string,
  ): Promise<{ ok: true } | { ok: false; sentence: string }>;
  /** Signs in as somebody else's session ended or began: re-reads who is signed in. */
  refreshPerson(): Promise<void>;
  /**
   * Closes this person's work on the device: it is handed over, or signed out of. Whatever waits stays, hidden, until
   * they open it again.
   */
  handOver(): Promise<void>;
  /** Opens the work of somebody who has signed in here before, without a network. */
  openPerson(personId: string, pin: string): Promise<PinAnswer>;
  /** Chooses the open person's PIN on this device. `current` is the one so far, where it is asked for. */
  setPin(pin: string, current: string | null): Promise<PinAnswer>;
  /** The person has read that entries were lost with a cleared store. */
  acknowledgeLost?(): Promise<void>;
  applyUpdate(): void;
}

export class DeviceError extends Error {
  constructor(
    readonly code: 'invalid' | 'device-full' | 'store-failed' | 'not-an-image' | 'signed-out',
    sentence: string,
    readonly fields: { path: string; message: string }[] = [],
  ) {
    super(sentence);
    this.name = 'DeviceError';
  }
}
