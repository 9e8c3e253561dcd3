'use client';

import { createContext, type ReactNode } from 'react';
import type { Device } from '@/lib/device/device-types';

/** The device that the screens below work on; null outside of a provider. */
export const DeviceContext = createContext<Device | null>(null);

/** Gives the screens below the device they read from and record on. */
export function DeviceProvider({ device, children }: { device: Device; children: ReactNode }) {
  return <DeviceContext.Provider value={device}>{children}</DeviceContext.Provider>;
}
