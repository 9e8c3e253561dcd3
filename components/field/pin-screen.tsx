'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { Notice } from '@/components/ui/notice';
import { pinProblem } from '@/lib/device/people/pin-guard';
import { problemsOf } from './problems-of';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { PinPad } from './pin-pad';
import { Screen } from './screen';
import { useDevice, useSnapshot } from './use-device';

type Step =
  | { ask: 'current' }
  | { ask: 'new'; current: string | null }
  | { ask: 'again'; current: string | null; pin: string };

const words: Record<Step['ask'], { heading: string; enter: string }> = {
  current: { heading: 'The PIN so far', enter: 'Next' },
  new: { heading: 'The new PIN', enter: 'Next' },
  again: { heading: 'The new PIN once more', enter: 'Keep' },
};

/** Chooses or changes the PIN behind which this person's work is hidden on this device. */
export function PinScreen() {
  const device = useDevice();
  const { pin, people, person } = useSnapshot();
  const first: Step = pin.needsCurrent ? { ask: 'current' } : { ask: 'new', current: null };
  const [step, setStep] = useState<Step>(first);
  const [problem, setProblem] = useState<string | null>(null);
  const [kept, setKept] = useState(false);
  const waitUntil = people.find((one) => one.id === person?.id)?.pin.waitUntil ?? null;

  const enter = async (typed: string) => {
    setProblem(null);
    if (step.ask === 'current') return setStep({ ask: 'new', current: typed });
    if (step.ask === 'new') {
      const unfit = pinProblem(typed);
      return unfit ? setProblem(unfit) : setStep({ ask: 'again', current: step.current, pin: typed });
    }
    if (typed !== step.pin) {
      setProblem('These two are not the same. Choose once more.');
      return setStep({ ask: 'new', current: step.current });
    }
    try {
      const answer = await device.setPin(typed, step.current);
      if (answer.ok) return setKept(true);
      setProblem(answer.sentence);
      setStep(first);
    } catch (error) {
      setProblem(Object.values(problemsOf(error))[0] ?? 'That was not kept. Try again.');
    }
  };
  return (
    <Screen title="Your PIN" aside="on this device" back={{ href: fieldPaths.pours, words: 'pours' }} form>
      <div className="mx-auto grid max-w-md gap-4">
        {kept ? (
          <Notice
            tone="met"
            title="The PIN is kept on this device"
            actions={
              <>
                <FieldLink href={fieldPaths.pours} className={buttonClasses('primary')}>
                  To the pours
                </FieldLink>
                <Button onClick={() => void device.handOver()}>Hand over now</Button>
              </>
            }
          >
            <p>
              It opens your work here, with or without a network. If you forget it, sign in with your
              password.
            </p>
          </Notice>
        ) : (
          <>
            <p>
              Four to eight digits. They keep your work on this device apart from the work of others: it is
              hidden, not encrypted. Whoever takes the device apart can read it. Your password is never kept
              here.
            </p>
            <section className="grid gap-2 border border-ink bg-sheet p-3">
              <h2 className="text-center text-heading">{words[step.ask].heading}</h2>
              <PinPad
                key={step.ask}
                label={words[step.ask].heading}
                enter={words[step.ask].enter}
                problem={problem}
                waitUntil={step.ask === 'current' ? waitUntil : null}
                onEnter={enter}
              />
            </section>
          </>
        )}
      </div>
    </Screen>
  );
}
