'use client';

import { Suspense, useSyncExternalStore } from 'react';
import { buttonClasses } from '@/components/ui/button-classes';
import { EmptyState } from '@/components/ui/empty-state';
import { Spinner } from '@/components/ui/spinner';
import { createDevice } from '@/lib/device/create-device';
import type { Device } from '@/lib/device/device-types';
import { DeviceProvider } from './device-context';
import { FieldLink, useFieldRoute } from './field-router';
import { fieldPaths } from './field-routes';
import { PeopleScreen } from './people-screen';
import { piece } from './piece';
import { PoursScreen } from './pours-screen';
import { Screen } from './screen';
import { StoreFailed } from './store-failed';
import { useSnapshot } from './use-device';

// The list of pours is what opens first; a pour's screens arrive in pieces of their own, which the worker keeps.
const PourScreen = piece(async () => (await import('./pour-screen')).PourScreen);
const PinScreen = piece(async () => (await import('./pin-screen')).PinScreen);
const NotSentScreen = piece(async () => (await import('./not-sent-screen')).NotSentScreen);

let opened: Device | null = null;
const neverChanges = () => () => undefined;
const openOnce = () => (opened ??= createDevice());

/**
 * The offline side: one page for every path under `/field`. The page that the server gives holds nothing of a person;
 * the device is opened once the page runs in the browser.
 * @param device another device than this browser's own, to try the screens
 */
export function FieldApp({ device: given }: { device?: Device }) {
  const own = useSyncExternalStore(neverChanges, given ? () => given : openOnce, () => null);
  if (!own) return <Opening />;
  return (
    <DeviceProvider device={own}>
      <Screens />
    </DeviceProvider>
  );
}

function Opening() {
  return (
    <div data-density="field" className="min-h-dvh bg-paper text-body text-ink">
      <main id="main" className="grid min-h-[60dvh] place-items-center">
        <h1 className="sr-only">Cagewright on site</h1>
        <Spinner label="Opening" />
      </main>
    </div>
  );
}

function Screens() {
  const route = useFieldRoute();
  const { asks, people, store } = useSnapshot();
  if (store === 'failed') return <StoreFailed />;
  // The address stays: who goes on here goes on where the last one was.
  if (asks && people.some((one) => one.pin.state !== 'none')) return <PeopleScreen />;
  switch (route.screen) {
    case 'pours':
      return <PoursScreen />;
    case 'pour':
      return (
        <Suspense fallback={<Opening />}>
          <PourScreen key={route.pourId} pourId={route.pourId} route={route.route} />
        </Suspense>
      );
    case 'not-sent':
      return (
        <Suspense fallback={<Opening />}>
          <NotSentScreen />
        </Suspense>
      );
    case 'pin':
      return (
        <Suspense fallback={<Opening />}>
          <PinScreen />
        </Suspense>
      );
    case 'unknown':
      return (
        <Screen title="Not here" back={{ href: fieldPaths.pours, words: 'pours' }}>
          <EmptyState
            title="There is no such screen"
            action={
              <FieldLink href={fieldPaths.pours} className={buttonClasses('primary')}>
                To the pours
              </FieldLink>
            }
          >
            The address may be from another version.
          </EmptyState>
        </Screen>
      );
  }
}
