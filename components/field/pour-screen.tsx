'use client';

import { Suspense, type ReactNode } from 'react';
import { Spinner } from '@/components/ui/spinner';
import { buttonClasses } from '@/components/ui/button-classes';
import { EmptyState } from '@/components/ui/empty-state';
import { FieldLink } from './field-router';
import { fieldPaths, type PourRoute } from './field-routes';
import type { OpenSheet } from './open-sheet';
import { piece } from './piece';
import { PieceMissing } from './piece-missing';
import { PourSheet } from './pour-sheet';
import { ReadingScreen } from './reading-screen';
import { Screen } from './screen';
import { SignInLink } from './sign-in-link';
import { useOpenPour, usePourFailed, useSnapshot } from './use-device';

// What is not needed at once arrives in its own pieces; the worker keeps them all, so that they open without a network.
const ChecksScreen = piece(async () => (await import('./checks-screen')).ChecksScreen);
const MeasurementsScreen = piece(async () => (await import('./measurements-screen')).MeasurementsScreen);
const CrewPour = piece(async () => (await import('./crew-pour')).CrewPour);
const FixListScreen = piece(async () => (await import('./fix-list-screen')).FixListScreen);
const HoldsScreen = piece(async () => (await import('./holds-screen')).HoldsScreen);
const PhotosScreen = piece(async () => (await import('./photos-screen')).PhotosScreen);
const NonconformanceForm = piece(async () => (await import('./nonconformance-form')).NonconformanceForm);
const NonconformanceScreen = piece(
  async () => (await import('./nonconformance-screen')).NonconformanceScreen,
);
const CorrectionForm = piece(async () => (await import('./correction-form')).CorrectionForm);
const EntryScreen = piece(async () => (await import('./entry-screen')).EntryScreen);
const EventsScreen = piece(async () => (await import('./events-screen')).EventsScreen);
const LastWalkScreen = piece(async () => (await import('./last-walk-screen')).LastWalkScreen);
const InstrumentsScreen = piece(async () => (await import('./instruments-screen')).InstrumentsScreen);
const ConfirmScreen = piece(async () => (await import('./confirm-screen')).ConfirmScreen);
const SignScreen = piece(async () => (await import('./sign-screen')).SignScreen);

const toPours = { href: fieldPaths.pours, words: 'pours' };

/** One pour: reads it from the device, says so while it does, and shows the screen that the path names. */
export function PourScreen({ pourId, route }: { pourId: string; route: PourRoute }) {
  const { person, pours, projects, sync, asks } = useSnapshot();
  const open = useOpenPour(pourId);
  const failed = usePourFailed(pourId);
  if (!person && sync.phase === 'idle' && !asks) return <Opening title="Pour" />;
  if (!person) {
    return (
      <Message title="Signed out" heading="Sign in to see this pour">
        <SignInLink className={buttonClasses('primary')}>Sign in</SignInLink>
      </Message>
    );
  }
  if (!open) {
    const known = pours.find((pour) => pour.id === pourId);
    if (known && !known.kept) {
      return (
        <Message title={known.number} heading={`${known.number} is not kept on this device`}>
          <FieldLink href={fieldPaths.pours} className={buttonClasses('primary')}>
            Choose what to keep
          </FieldLink>
        </Message>
      );
    }
    if (!known && projects.length > 0) {
      return (
        <Message
          title="Pour"
          heading="This device has not heard of this pour"
          text="It may belong to a project you are not in, or the device has not fetched it yet."
        />
      );
    }
    if (failed) return <PieceMissing title={known?.number ?? 'Pour'} />;
    return (
      <Screen title={known?.number ?? 'Pour'} back={toPours}>
        <p className="p-4">
          <Spinner label="Opening the sheet" />
        </p>
      </Screen>
    );
  }
  if (open.crew) {
    return (
      <Suspense fallback={<Opening title={open.pour.number} />}>
        <CrewPour open={open} crew={open.crew} route={route} />
      </Suspense>
    );
  }
  if (!open.sheet) {
    return (
      <Message
        title={open.pour.number}
        heading={
          open.pour.serverPlanRevision > 0 ? 'The plan is not on this device yet' : 'There is no plan yet'
        }
        text={
          open.pour.serverPlanRevision > 0
            ? 'It is fetched as soon as there is a network.'
            : 'The office issues the plan; then the sheet opens here.'
        }
      />
    );
  }
  return (
    <Suspense fallback={<Opening title={open.pour.number} />}>
      <PourPart open={{ ...open, sheet: open.sheet, person }} route={route} />
    </Suspense>
  );
}

function PourPart({ open, route }: { open: OpenSheet; route: PourRoute }) {
  switch (route.part) {
    case 'sheet':
      return <PourSheet open={open} />;
    case 'face':
      return (
        <ReadingScreen
          key={`${route.faceId}/${route.pointKey ?? ''}`}
          open={open}
          faceId={route.faceId}
          pointKey={route.pointKey}
        />
      );
    case 'checks':
      return <ChecksScreen open={open} group={route.group} />;
    case 'measurements':
      return <MeasurementsScreen open={open} itemId={route.itemId} />;
    case 'fix-list':
      return <FixListScreen open={open} />;
    case 'holds':
      return <HoldsScreen open={open} />;
    case 'photos':
      return <PhotosScreen open={open} about={route.about} />;
    case 'nonconformance':
      return <NonconformanceForm open={open} about={route.about} />;
    case 'nonconformance-shown':
      return <NonconformanceScreen open={open} id={route.id} />;
    case 'correction':
      return <CorrectionForm open={open} about={route.about} />;
    case 'entry':
      return <EntryScreen key={route.entryId} open={open} entryId={route.entryId} />;
    case 'events':
      return <EventsScreen open={open} />;
    case 'last-walk':
      return <LastWalkScreen open={open} />;
    case 'instruments':
      return <InstrumentsScreen open={open} />;
    case 'confirm':
      return <ConfirmScreen open={open} />;
    case 'sign':
      return <SignScreen open={open} />;
  }
}

function Opening({ title }: { title: string }) {
  return (
    <Screen title={title} back={toPours}>
      <p className="p-4">
        <Spinner label="Opening" />
      </p>
    </Screen>
  );
}

function Message({
  title,
  heading,
  text,
  children,
}: {
  title: string;
  heading: string;
  text?: string;
  children?: ReactNode;
}) {
  return (
    <Screen title={title} back={toPours}>
      <EmptyState title={heading} action={children}>
        {text}
      </EmptyState>
    </Screen>
  );
}
