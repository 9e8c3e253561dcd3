import { DeviceError } from './device-types';
import type { RecordSchemas } from './record-schemas';

/**
 * The schemas, in a piece of the program of its own that arrives after the list of pours is drawn.
 * @throws DeviceError where that piece is not on this device and there is no network
 */
export async function loadSchemas(): Promise<RecordSchemas> {
  const { recordSchemas } = await import('./record-schemas').catch(() => {
    throw new DeviceError(
      'store-failed',
      'A piece of Cagewright is not on this device yet. Load this page again once there is a network.',
    );
  });
  return recordSchemas;
}
