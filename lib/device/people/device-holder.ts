import type { DeviceIndex } from '@/lib/inspection/wire';
import type { DeviceEnvironment, TabChannel } from '../device-environment';
import { DeviceError, type DevicePerson, type DeviceSnapshot, type PinAnswer } from '../device-types';
import { PersonWork } from '../person-work';
import { unlessFull } from '../store/person-database';
import type { SettingsStore } from '../store/settings-store';
import { PeopleHere } from './people-here';

interface HolderHost {
  /** Something to show changed. */
  changed(): void;
  /** Something was recorded, here or in another tab, and can be sent. */
  wantsSending(): void;
  /** Another person's work was opened, or none is open any more. */
  personChanged(): void;
  /** Another tab opened somebody's work here: the server may know them. */
  followed(): void;
}

/**
 * Whose work is open on this device. It changes hands by a PIN, by signing in with the password, and by being handed
 * over; all tabs go along. (SPEC 30 to 33)
 */
export class DeviceHolder {
  work: PersonWork | null = null;
  #people: PeopleHere | null = null;
  deviceId = '';
  /** Who has given their password since this page was loaded: they may choose a new PIN without the old one. */
  #gavePassword: string | null = null;
  #closed = false;
  readonly #tabs: TabChannel;

  constructor(
    private readonly env: DeviceEnvironment,
    private readonly host: HolderHost,
  ) {
    this.#tabs = env.channel('cagewright-hands', () => void this.#follow());
  }

  /** Opens the work of whoever holds the device, where that needs no asking. */
  async start(settings: SettingsStore, deviceId: string): Promise<void> {
    this.deviceId = deviceId;
    this.#people = new PeopleHere(this.env, settings);
    await this.#people.read();
    const person = this.#people.opensByItself;
    if (person) await this.#open(person);
  }

  /** The server says whose session it has: one begun with a password since then opens that person's work. */
  async heard({ person, signedInAt }: DeviceIndex): Promise<void> {
    const people = this.#people;
    if (!people) return;
    const isNew = await people.isNewSession(person.id, signedInAt ?? null);
    if (!isNew && people.knows(person.id)) return;
    this.#gavePassword = person.id;
    if (this.work?.person.id !== person.id) await this.#changeHands(person);
  }

  /** A session that was heard of while somebody holds the device is no new one when the page is loaded again. */
  async noteSession({ person, signedInAt }: DeviceIndex): Promise<void> {
    await this.#people?.isNewSession(person.id, signedInAt ?? null);
  }

  /** @throws DeviceError `signed-out` while nobody's work is open */
  need(): PersonWork {
    if (!this.work) throw new DeviceError('signed-out', 'Nobody is signed in on this device. Sign in first.');
    return this.work;
  }

  async handOver(): Promise<void> {
    await this.#people?.lock();
    await this.#closeWork();
    this.#tabs.post({ streams: [] });
  }

  async openPerson(personId: string, pin: string): Promise<PinAnswer> {
    const { person, answer } = await this.#known().tryPin(personId, pin);
    if (person) await this.#changeHands(person);
    this.host.changed();
    return answer;
  }

  async setPin(pin: string, current: string | null): Promise<PinAnswer> {
    const { person } = this.need();
    const asked = this.#gavePassword === person.id ? null : (current ?? '');
    const answer = await this.#known().setPin(person.id, pin, asked);
    this.host.changed();
    return answer;
  }

  /** What the screens show of the people of this device. */
  shown(): Pick<DeviceSnapshot, 'people' | 'pin'> {
    const personId = this.work?.person.id ?? '';
    const set = this.#people?.hasPin(personId) ?? false;
    return {
      people: this.#people?.list() ?? [],
      pin: { set, needsCurrent: set && this.#gavePassword !== personId },
    };
  }

  /** The next person at this device is shown whose work waits, and how much of it. */
  async noteWaiting(): Promise<void> {
    const { work } = this;
    if (work) await this.#people?.noteWaiting(work.person.id, work.waiting()).catch(() => undefined);
  }

  close(): void {
    this.#closed = true;
    this.#tabs.close();
    this.work?.close();
  }

  #known(): PeopleHere {
    if (!this.#people) throw new DeviceError('store-failed', 'This device could not read who uses it.');
    return this.#people;
  }

  async #open(person: DevicePerson): Promise<void> {
    let opened: PersonWork | null = null;
    const work = await PersonWork.open(this.env, person, this.deviceId, (wantsSending) => {
      if (opened === null || this.work !== opened) return;
      if (wantsSending) this.host.wantsSending();
      this.host.changed();
    });
    opened = work;
    if (this.#closed) return work.close();
    const before = this.work;
    this.work = work;
    before?.close();
    this.host.personChanged();
    // A full device opens what it holds: that it was opened is noted once there is room.
    await this.#people?.opened(person).catch(unlessFull);
    this.host.changed();
  }

  /** Opens this person's work here, and in the other tabs. */
  async #changeHands(person: DevicePerson): Promise<void> {
    await this.#open(person);
    this.#tabs.post({ streams: [] });
  }

  /** Another tab has handed the device over, or opened somebody's work. */
  async #follow(): Promise<void> {
    if (this.#closed || !this.#people) return;
    await this.#people.read();
    const { holder } = this.#people;
    if (holder === null) return this.#closeWork();
    if (holder.id === this.work?.person.id) return;
    await this.#open(holder);
    this.host.followed();
  }

  async #closeWork(): Promise<void> {
    await this.noteWaiting();
    const { work } = this;
    this.work = null;
    this.#gavePassword = null;
    work?.close();
    this.host.personChanged();
    this.host.changed();
  }
}
