import type { DeviceEnvironment } from '../device-environment';
import type { SyncState } from '../device-types';
import { markName, personsMarked, readMark } from './high-water-mark';
import type { SettingsStore } from './settings-store';

/** What an emptied store has lost, of all people of the device; null: none known. */
type Lost = Pick<SyncState, 'lostEntries' | 'lostPhotos'> | null;

/** The id of this device, made where it has none, and what an emptied store has lost. */
export async function deviceIdOf(
  env: DeviceEnvironment,
  settings: SettingsStore,
): Promise<{ deviceId: string; lost: Lost }> {
  const known = await settings.read('deviceId');
  if (known) return { deviceId: known, lost: null };
  const marks = personsMarked(env.marks.names()).map((id) => readMark(env.marks.read(markName(id))));
  // An emptied store has forgotten its id; the cookie has not, and order on this device hangs on it.
  const deviceId = marks.find((mark) => mark)?.deviceId ?? env.newId();
  await settings.write('deviceId', deviceId);
  const entries = marks.reduce((sum, mark) => sum + (mark?.unsent ?? 0), 0);
  const photos = marks.reduce((sum, mark) => sum + (mark?.unsentPhotos ?? 0), 0);
  return { deviceId, lost: { lostEntries: entries || null, lostPhotos: photos || null } };
}
