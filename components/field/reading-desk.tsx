'use client';

import { useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { withUnit } from '@/lib/concrete/length';
import type { BodyOf } from '@/lib/inspection/entry';
import type { FaceState } from '@/lib/inspection/sheet-types';
import { FaceSection, FaceTable, NEW_SPOT, WorkingMap } from './face-drawings';
import { governingBeside } from './governing-beside';
import { instrumentStanding } from './instrument-words';
import { FieldLink } from './field-router';
import { onwardFrom } from './onward';
import { BlockKeys, Keypad } from './keypad';
import type { FaceOfPlan, OpenSheet } from './open-sheet';
import { pressed, pressesOf, readPresses, type Press } from './reading-keys';
import { ReadingContextBar, type Picker } from './reading-context-bar';
import { ReadingPanels, type Panel } from './reading-panels';
import { ReadingPicker } from './reading-pickers';
import { ReadingReadout } from './reading-readout';
import { readingTarget, type Chosen } from './reading-target';
import { RefusedStrip } from './refused-strip';
import { useSnapshot } from './use-device';
import { findReading, useKeepReading } from './use-keep-reading';
import { useNow } from './use-now';
import { useReadingSettings } from './use-reading-settings';
import { useRefusedAgain } from './use-refused-again';
import { useTypedKeys } from './use-typed-keys';
import { VerdictStrip } from './verdict-strip';
import { nextPoint } from './walk-order';

/** The map over the keypad: a point is lit, type, keep, the tick drops, the verdict is said, the next point is lit. */
export function ReadingDesk({
  open,
  place,
  state,
  firstKey,
}: {
  open: OpenSheet;
  place: FaceOfPlan;
  state: FaceState;
  /** The point that was asked for; null: the next of the walk. */
  firstKey: string | null;
}) {
  const { face } = place;
  const again = useRefusedAgain('reading', (body) => body.faceId === face.id);
  const setup = useReadingSettings(open, face, again?.body);
  const { unit, requirement, instrument } = setup;
  const { sync } = useSnapshot();
  const nowMs = useNow();
  const [refilled] = useState<readonly Press[]>(() =>
    again?.body.value ? pressesOf(again.body.value, unit) : [],
  );
  const [presses, setPresses] = useState(refilled);
  const [chosen, setChosen] = useState<Chosen | null>(() =>
    again?.body.spot
      ? { kind: 'spot', place: again.body.spot }
      : firstKey
        ? { kind: 'point', key: firstKey }
        : null,
  );
  const [from, setFrom] = useState<{ xMm: number; yMm: number; key?: string } | null>(null);
  const [picker, setPicker] = useState<Picker | null>(null);
  const [panel, setPanel] = useState<Panel | null>(null);
  const [doubted, setDoubted] = useState<readonly Press[] | null>(null);
  const [asFoundBar, setAsFoundBar] = useState('');
  const { busy, problem, kept, keep, undo, say } = useKeepReading(open, setup.settings.sound, again);

  const shownRequirement = requirement ?? face.requirements[0];
  const target = readingTarget(state, chosen, from);
  const here = target?.place ?? null;
  const next = nextPoint(
    state.points.filter((point) => point.key !== target?.point?.key),
    here,
  );
  const onward = target === null ? onwardFrom(open, face.id) : null;
  const standingAt = {
    now: new Date(nowMs).toISOString(),
    timeZone: open.project.timeZone,
    clockOffsetMs: sync.clockOffsetMs,
  };
  const standing = instrument ? instrumentStanding(instrument, standingAt) : null;
  const last = kept ? findReading(open, kept.entryId) : null;

  const press = (one: Press) => {
    say(null);
    setPresses((before) => pressed(before, one));
  };

  const keepBody = async (said: Pick<BodyOf<'reading'>, 'value' | 'goNoGo'>) => {
    if (!target) return say('Tap the map where you read.');
    if (!instrument) {
      setPicker('instrument');
      return;
    }
    if (busy) return;
    const typed = presses;
    setPresses([]);
    const done = await keep({
      faceId: face.id,
      requirementId: requirement?.id ?? null,
      steel: setup.steel,
      pointId: target.point?.key ?? null,
      spot: target.point ? null : target.place,
      ...said,
      instrumentId: instrument.instrumentId,
      phase: 'before',
      // What is sent again unchanged was measured when it was measured.
      measuredAt: again && typed === refilled ? again.body.measuredAt : new Date().toISOString(),
      asFoundBar: asFoundBar.trim() || null,
      measurer: setup.measurer && { personId: setup.measurer.id, confirmed: false },
    });
    if (!done) {
      setPresses((before) => (before.length === 0 ? typed : before));
      return;
    }
    setFrom({ ...target.place, ...(target.point ? { key: target.point.key } : {}) });
    setChosen(null);
    setAsFoundBar('');
  };

  const keepTyped = () => {
    const read = readPresses(presses, unit);
    if (!read.ok) return say(read.problem);
    const { thicknessMm } = place.element;
    if (read.value.mm !== null && read.value.mm > thicknessMm && doubted !== presses) {
      setDoubted(presses);
      return say(`More than the section, ${withUnit(thicknessMm, unit)}. Keep again if it is so.`);
    }
    void keepBody({ value: read.value, goNoGo: null });
  };
  const keepBlock = (passes: boolean) =>
    void keepBody({ value: null, goNoGo: { blockMm: setup.blockMm, passes } });

  useTypedKeys({
    enabled: !setup.isBlock,
    filled: presses.length > 0,
    onChar: (char) => press({ kind: 'char', char }),
    onDelete: () => setPresses((before) => before.slice(0, -1)),
    onEnter: keepTyped,
  });

  // The lit point comes into view by itself, unless the person has scrolled on to the section.
  const drawings = useRef<HTMLDivElement>(null);
  const litKey = target ? (target.point?.key ?? NEW_SPOT) : null;
  useEffect(() => {
    const area = drawings.current;
    if (!area || litKey === null || area.scrollTop > area.clientHeight) return;
    area
      .querySelector(`[data-point="${CSS.escape(litKey)}"]`)
      ?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }, [litKey]);

  const choosePoint = (key: string) => {
    if (key === NEW_SPOT) return;
    setChosen({ kind: 'point', key });
  };

  return (
    <div className="grid h-full min-h-0 grid-cols-[minmax(0,1fr)] grid-rows-[minmax(3.5rem,1fr)_auto] overflow-y-auto bg-sheet md:overflow-hidden md:landscape:grid-cols-[minmax(0,1fr)_26rem] md:landscape:grid-rows-1">
      <div ref={drawings} className="min-h-0 overflow-y-auto">
        <WorkingMap
          place={place}
          state={state}
          unit={unit}
          selected={litKey}
          spot={chosen?.kind === 'spot' ? chosen.place : null}
          onPoint={choosePoint}
          onSpot={(spot) => setChosen({ kind: 'spot', place: spot })}
        />
        {shownRequirement && (
          <FaceSection
            place={place}
            state={state}
            requirement={shownRequirement}
            unit={unit}
            dropId={kept?.entryId ?? null}
          />
        )}
        <FaceTable place={place} state={state} unit={unit} />
      </div>
      {/* A tablet held upright has the map over both hands: what is read on the left, the keys on the right. */}
      <div className="flex min-h-0 flex-col justify-end border-ink bg-sheet md:overflow-y-auto md:portrait:grid md:portrait:grid-cols-2 md:portrait:border-t md:landscape:border-l">
        <div className="flex flex-col justify-end">
          <ReadingReadout
            target={target}
            presses={presses}
            unit={unit}
            limits={requirement}
            problem={problem}
            block={setup.isBlock ? withUnit(setup.blockMm, unit) : null}
            onShowReadings={() => setPanel('point')}
          />
          {kept && !last && <RefusedStrip entryId={kept.entryId} />}
          {last && kept && (
            <VerdictStrip
              open={open}
              reading={last.reading}
              label={last.point.label}
              pointKey={last.point.key}
              governs={governingBeside(last.point, last.reading)}
              unit={unit}
              onUndo={
                kept.undoable
                  ? () => void undo().then((point) => point && setChosen({ kind: 'point', key: point.key }))
                  : null
              }
              onAgain={() => setChosen({ kind: 'point', key: last.point.key })}
              onHow={() => setPanel('how')}
            />
          )}
          <ReadingContextBar
            instrument={instrument?.name ?? 'choose'}
            instrumentNote={standing?.short ?? ''}
            instrumentGood={standing?.good ?? false}
            steel={asFoundBar.trim() ? `${setup.steel} (found ${asFoundBar.trim()})` : setup.steel}
            unit={unit}
            readBy={setup.measurer?.name ?? null}
            onPick={setPicker}
          />
        </div>
        <div className="flex flex-col justify-end border-ink md:portrait:border-l">
          {setup.isBlock ? (
            <BlockKeys block={withUnit(setup.blockMm, unit)} busy={busy} onKeep={keepBlock} />
          ) : (
            <>
              <Keypad
                unit={unit}
                onPress={press}
                onDelete={() => setPresses((before) => before.slice(0, -1))}
              />
              {onward && presses.length === 0 ? (
                <FieldLink href={onward.href} className={buttonClasses('primary', true, 'h-15 text-lead')}>
                  {onward.words}
                </FieldLink>
              ) : (
                <Button
                  variant="primary"
                  wide
                  className="h-15 text-lead"
                  aria-disabled={presses.length === 0 || undefined}
                  onClick={keepTyped}
                >
                  {next ? `Keep, next ${next.label}` : 'Keep'}
                </Button>
              )}
            </>
          )}
          <div className="pb-[env(safe-area-inset-bottom)]" />
        </div>
      </div>
      <ReadingPicker
        which={picker}
        open={open}
        face={face}
        setup={setup}
        asFoundBar={asFoundBar}
        onAsFoundBar={setAsFoundBar}
        standingAt={standingAt}
        onClose={() => setPicker(null)}
      />
      <ReadingPanels
        which={panel}
        open={open}
        last={last?.reading ?? null}
        target={target}
        unit={unit}
        onClose={() => setPanel(null)}
      />
    </div>
  );
}
