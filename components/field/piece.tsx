'use client';

import { lazy, type ComponentType, type LazyExoticComponent } from 'react';
import { PieceMissing } from './piece-missing';

/**
 * A screen that arrives in a piece of its own. Where the piece is not on the device and there is no network, it says so
 * instead of turning for ever.
 */
export function piece<P extends object>(
  load: () => Promise<ComponentType<P>>,
): LazyExoticComponent<ComponentType<P>> {
  return lazy(async () => ({
    default: await load().catch((error: unknown): ComponentType<P> => {
      console.error(error);
      return Missing;
    }),
  }));
}

/** Takes whatever the missing screen would be given, and needs none of it. */
function Missing() {
  return <PieceMissing />;
}
