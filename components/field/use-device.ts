'use client';

import { useCallback, useContext, useSyncExternalStore } from 'react';
import type { Device, DeviceSnapshot, OpenPour } from '@/lib/device/device-types';
import { DeviceContext } from './device-context';

/** The device itself, to record on. Throws outside of a `DeviceProvider`: that is a mistake of the program. */
export function useDevice(): Device {
  const device = useContext(DeviceContext);
  if (!device) throw new Error('No device is given to these screens.');
  return device;
}

/** What the device knows as a whole: person, pours, sync, refused entries, photos, storage. */
export function useSnapshot(): DeviceSnapshot {
  const device = useDevice();
  const subscribe = useCallback((listener: () => void) => device.subscribe(listener), [device]);
  const read = useCallback(() => device.snapshot(), [device]);
  return useSyncExternalStore(subscribe, read, read);
}

/** One pour with its sheet and holds; undefined while it is being read from the store. */
export function useOpenPour(pourId: string): OpenPour | undefined {
  const device = useDevice();
  const subscribe = useCallback((listener: () => void) => device.subscribe(listener), [device]);
  const read = useCallback(() => device.pour(pourId), [device, pourId]);
  return useSyncExternalStore(subscribe, read, read);
}

/** Did this pour turn out not to open on this device? */
export function usePourFailed(pourId: string): boolean {
  const device = useDevice();
  const subscribe = useCallback((listener: () => void) => device.subscribe(listener), [device]);
  const read = useCallback(() => device.pourFailed(pourId), [device, pourId]);
  return useSyncExternalStore(subscribe, read, read);
}
