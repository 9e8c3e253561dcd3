import { DeviceError } from '../device-types';
import { isDeviceFull } from './person-database';

/** What a person is told where an entry could not be written: nothing of it was. */
export const notSaved = (error: unknown): DeviceError =>
  isDeviceFull(error)
    ? new DeviceError(
        'device-full',
        'This device has no room left. This was not saved; everything saved before is kept. Send what waits or save it to a file, make room, and enter this again.',
      )
    : new DeviceError(
        'store-failed',
        'This could not be saved on the device. Everything saved before is kept. Load this page again and enter it once more.',
      );
