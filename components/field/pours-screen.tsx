'use client';

import { Spinner } from '@/components/ui/spinner';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { buttonClasses } from '@/components/ui/button-classes';
import type { DevicePour, DeviceSnapshot } from '@/lib/device/device-types';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { InstallOffer } from './install-offer';
import { PourRow } from './pour-row';
import { OthersWaiting } from './others-waiting';
import { Screen } from './screen';
import { SignOut } from './sign-out';
import { useSnapshot } from './use-device';
import { LeaveLink } from '@/components/ui/leave-link';

const byPlannedTime = (a: DevicePour, b: DevicePour) =>
  (a.plannedAt ?? '9').localeCompare(b.plannedAt ?? '9') || a.number.localeCompare(b.number);

/** The pours kept on this device and those it has heard of, by planned time. */
export function PoursScreen() {
  const snapshot = useSnapshot();
  const [choosing, setChoosing] = useState(false);
  if (!snapshot.person) return <SignedOut snapshot={snapshot} />;
  return (
    <Screen title="Pours" aside={snapshot.person.name}>
      {snapshot.projects.length === 0 && <NothingYet snapshot={snapshot} />}
      <div className="grid gap-8">
        {snapshot.pours.length > 0 && (
          <Button
            aria-pressed={choosing}
            onClick={() => setChoosing(!choosing)}
            className="-mb-4 justify-self-end"
          >
            {choosing ? 'Done choosing' : 'Choose what is kept here'}
          </Button>
        )}
        {snapshot.projects.map((project) => {
          const pours = snapshot.pours.filter((pour) => pour.projectId === project.id).sort(byPlannedTime);
          return (
            <section key={project.id} aria-labelledby={`project-${project.id}`} className="grid gap-4">
              <h2 id={`project-${project.id}`} className="text-heading">
                {project.name}
              </h2>
              <PourList
                heading="On this device"
                empty="No pour of this project is kept here. Keep one while you have a network, and it opens without one."
                pours={pours.filter((pour) => pour.kept)}
                choosing={choosing}
                timeZone={project.timeZone}
              />
              <PourList
                heading="Not on this device"
                empty={null}
                pours={pours.filter((pour) => !pour.kept)}
                choosing
                timeZone={project.timeZone}
              />
            </section>
          );
        })}
        <OthersWaiting />
        <InstallOffer />
        <footer className="grid gap-4 border-t border-rule pt-4">
          <ThemeSwitch />
          <nav aria-label="Elsewhere" className="flex flex-wrap gap-2">
            {snapshot.projects.some((project) => project.role !== 'crew') && (
              <LeaveLink href="/pours" className={buttonClasses('quiet')}>
                The office side
              </LeaveLink>
            )}
            <LeaveLink href="/account" className={buttonClasses('quiet')}>
              Account
            </LeaveLink>
            <FieldLink href={fieldPaths.pin} className={buttonClasses('quiet')}>
              {snapshot.pin.set ? 'Change the PIN' : 'Choose a PIN'}
            </FieldLink>
            <SignOut />
          </nav>
        </footer>
      </div>
    </Screen>
  );
}

function PourList({
  heading,
  empty,
  pours,
  choosing,
  timeZone,
}: {
  heading: string;
  empty: string | null;
  pours: DevicePour[];
  choosing: boolean;
  timeZone: string;
}) {
  if (pours.length === 0 && empty === null) return null;
  return (
    <div className="grid gap-2">
      <h3 className="font-label text-label font-semibold text-pencil">{heading}</h3>
      {pours.length === 0 ? (
        <p className="text-pencil">{empty}</p>
      ) : (
        <ul className="border border-ink bg-sheet">
          {pours.map((pour) => (
            <PourRow key={pour.id} pour={pour} choosing={choosing} timeZone={timeZone} />
          ))}
        </ul>
      )}
    </div>
  );
}

function NothingYet({ snapshot }: { snapshot: DeviceSnapshot }) {
  const { phase, lastSuccessAt } = snapshot.sync;
  // Until the server has answered once, nothing says that there is no project.
  const busy = phase === 'fetching' || phase === 'sending' || (phase === 'idle' && lastSuccessAt === null);
  return (
    <EmptyState title={busy ? 'Fetching your projects' : 'No project yet'}>
      {busy
        ? 'This takes a moment the first time.'
        : (snapshot.sync.message ??
          'You are in no project yet, or this device has not heard of it. Ask your coordinator, and open this page with a network.')}
    </EmptyState>
  );
}

/** The store is being read, or the server asked who is signed in: a moment in which nothing is known. */
function LookingWho() {
  return (
    <Screen title="Cagewright on site">
      <div className="grid justify-items-center gap-6 py-16">
        <Spinner label="Opening" />
        <LeaveLink href="/sign-in?next=/field" className={buttonClasses('quiet')}>
          Sign in
        </LeaveLink>
      </div>
    </Screen>
  );
}

function SignedOut({ snapshot }: { snapshot: DeviceSnapshot }) {
  if (snapshot.sync.phase === 'idle' && !snapshot.asks) return <LookingWho />;
  const offline = snapshot.sync.phase === 'offline';
  return (
    <Screen title="Cagewright on site">
      <div className="grid gap-6">
        <EmptyState
          title="Sign in to begin"
          action={
            <LeaveLink href="/sign-in?next=/field" className={buttonClasses('primary')}>
              Sign in
            </LeaveLink>
          }
        >
          {offline
            ? 'There is no network here. The first sign-in on a device needs one; after that, your pours open without it.'
            : 'You need a network once. After that, your pours open without one, and what you record is sent when the network is back.'}
        </EmptyState>
        <OthersWaiting />
        <ThemeSwitch />
      </div>
    </Screen>
  );
}
