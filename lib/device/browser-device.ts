import { browserEnvironment } from './browser-environment';
import { createDevice } from './create-device';
import type { Device } from './device-types';

let device: Device | null = null;

/** The one device of this page, made when it is first asked for. Only in a browser, never while a page is rendered. */
export function browserDevice(): Device {
  device ??= createDevice(browserEnvironment());
  return device;
}
