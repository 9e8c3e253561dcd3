'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { classNames } from '@/components/ui/class-names';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import type { PersonOnDevice } from '@/lib/device/device-types';
import { problemsOf } from './problems-of';
import { PinPad } from './pin-pad';
import { Screen } from './screen';
import { SignInLink } from './sign-in-link';
import { useDevice, useSnapshot } from './use-device';
import { useNow } from './use-now';
import { waitsWords } from './waiting-words';

/** Who is holding this device: everybody who has signed in here, each behind a PIN. Nothing of anybody's work shows. */
export function PeopleScreen() {
  const { people } = useSnapshot();
  const last = people.find((one) => one.pin.state === 'set') ?? people[0];
  const [chosenId, choose] = useState<string | null>(last?.id ?? null);
  const chosen = people.find((one) => one.id === chosenId);
  return (
    <Screen title="Who is holding this device?">
      <div className="grid gap-6 md:grid-cols-2 md:items-start">
        <div className={classNames('grid gap-4', chosen && 'max-md:hidden')}>
          <ul className="border border-ink bg-sheet">
            {people.map((one) => (
              <PersonRow
                key={one.id}
                person={one}
                chosen={one.id === chosenId}
                onChoose={() => choose(one.id)}
              />
            ))}
          </ul>
          <SomebodyElse />
        </div>
        {chosen && (
          <div className="grid gap-3">
            <Open key={chosen.id} person={chosen} />
            <Button wide className="md:hidden" onClick={() => choose(null)}>
              {people.length > 1 ? `I am not ${chosen.name}` : 'Somebody else'}
            </Button>
          </div>
        )}
      </div>
      <footer className="mt-8 border-t border-rule pt-4">
        <ThemeSwitch />
      </footer>
    </Screen>
  );
}

function SomebodyElse() {
  return (
    <div className="grid gap-2">
      <SignInLink className={buttonClasses('secondary', true)}>Sign in as somebody else</SignInLink>
      <p className="px-1 text-label text-pencil">
        The first time on this device takes the network and your password. After that a PIN is enough.
      </p>
    </div>
  );
}

function PersonRow({
  person,
  chosen,
  onChoose,
}: {
  person: PersonOnDevice;
  chosen: boolean;
  onChoose: () => void;
}) {
  const now = useNow();
  const { waiting, pin } = person;
  return (
    <li className="border-b border-rule last:border-b-0">
      <button
        type="button"
        aria-pressed={chosen}
        onClick={onChoose}
        className={classNames(
          'block min-h-18 w-full border-l-8 px-3 py-2 text-left',
          chosen ? 'border-l-chalk bg-paper' : 'border-l-transparent',
        )}
      >
        <span className="block font-label text-lead font-semibold">{person.name}</span>
        <span className="block text-label text-pencil">
          {waitsWords(waiting, now) || 'nothing waits'}
          {pin.state !== 'set' && ' · opens with the password'}
        </span>
      </button>
    </li>
  );
}

function Open({ person }: { person: PersonOnDevice }) {
  const device = useDevice();
  const [problem, setProblem] = useState<string | null>(null);
  const { pin } = person;
  if (pin.state !== 'set') {
    return (
      <section className="grid gap-3 border border-ink bg-sheet p-3">
        <h2 className="text-heading">{person.name}</h2>
        <p>
          {pin.state === 'closed'
            ? 'There were too many wrong tries at the PIN. Signing in with the password opens the work again. What waits is kept.'
            : 'No PIN was chosen on this device. It takes the network and the password to open the work. What waits is kept.'}
        </p>
        <SignInLink className={buttonClasses('primary', true)}>Sign in as {person.name}</SignInLink>
      </section>
    );
  }
  const open = async (typed: string) => {
    setProblem(null);
    try {
      const answer = await device.openPerson(person.id, typed);
      if (answer.ok) return;
      setProblem(answer.sentence);
      if (typeof navigator.vibrate === 'function') navigator.vibrate([160, 70, 160]);
    } catch (error) {
      setProblem(Object.values(problemsOf(error))[0] ?? 'That did not work. Try again.');
    }
  };
  return (
    <section className="grid gap-2 border border-ink bg-sheet p-3">
      <h2 className="text-center text-heading">{person.name}</h2>
      <PinPad
        label={`PIN of ${person.name}`}
        enter="Open"
        problem={problem}
        waitUntil={pin.waitUntil}
        onEnter={open}
      />
      <SignInLink className={buttonClasses('quiet', true)}>
        PIN forgotten: sign in with the password
      </SignInLink>
    </section>
  );
}
