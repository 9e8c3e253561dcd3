'use client';

import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { exposureClasses } from '@/lib/concrete/exposure-classes';
import { meetings } from '@/lib/inspection/plan';
import { FacePreview } from './face-preview';
import { emptyRequirement, newKey, type PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';
import { RequirementFields } from './requirement-fields';
import { basisWords, meetingWords } from './state-words';

/** One face: how it meets what is beyond it, its size, its required covers, its points; and what follows, live. */
export function FaceFields({
  elementIndex,
  faceIndex,
  pourId,
  onRemove,
}: {
  elementIndex: number;
  faceIndex: number;
  pourId: string | null;
  onRemove: (() => void) | null;
}) {
  const path = `elements.${elementIndex}.faces.${faceIndex}` as const;
  const { control, register } = useFormContext<PlanDraft>();
  const [units, basis, name] = useWatch({ control, name: ['units', 'basis', `${path}.name`] as const });
  const requirements = useFieldArray({ control, name: `${path}.requirements`, keyName: 'key' });
  const exposures = exposureClasses(basis);
  return (
    <fieldset className="grid gap-4 border-t border-rule pt-3 lg:grid-cols-2">
      <legend className="float-left w-full font-label text-lead font-semibold lg:col-span-2">
        Face {name || faceIndex + 1}
      </legend>
      <div className="grid content-start gap-3">
        <div className="grid gap-3 sm:grid-cols-2">
          <PlanText path={`${path}.name`} label="Face" hint="Soffit, top, side, end" />
          <PlanSelect
            path={`${path}.meeting`}
            label="How the concrete meets it"
            hint="What is beyond the face"
            options={meetings.map((meeting) => ({ value: meeting, label: meetingWords[meeting] }))}
          />
          <PlanText path={`${path}.width`} label="Width" unit={units} />
          <PlanText path={`${path}.height`} label="Height" unit={units} />
          {exposures.length > 0 ? (
            <PlanSelect
              path={`${path}.exposure`}
              label="Exposure"
              hint={`In the words of ${basisWords[basis]}`}
              options={exposures.map(({ value, label }) => ({ value, label }))}
              placeholder="Choose"
            />
          ) : (
            <PlanText path={`${path}.exposure`} label="Exposure" hint="As the contract says it" optional />
          )}
          <PlanText
            path={`${path}.drawnPoints`}
            label="Points drawn"
            hint="Left empty: by element and area"
            optional
            figure
          />
        </div>
        <Checkbox label="This is a soffit" {...register(`${path}.soffit`)} />
        {requirements.fields.map((field, index) => (
          <RequirementFields
            key={field.key}
            path={`${path}.requirements.${index}`}
            number={index + 1}
            units={units}
            basis={basis}
            onRemove={requirements.fields.length > 1 ? () => requirements.remove(index) : null}
          />
        ))}
        <div>
          <Button variant="quiet" onClick={() => requirements.append(emptyRequirement())}>
            Add a cover for another steel
          </Button>
        </div>
        <ChosenPoints path={path} units={units} />
        {onRemove && (
          <div>
            <Button variant="quiet" onClick={onRemove}>
              Remove this face
            </Button>
          </div>
        )}
      </div>
      <FacePreview {...{ elementIndex, faceIndex, pourId }} />
    </fieldset>
  );
}

/** Points where failures live, chosen by the planner; openings, where nothing can be read. */
function ChosenPoints({ path, units }: { path: `elements.${number}.faces.${number}`; units: 'mm' | 'in' }) {
  const { control } = useFormContext<PlanDraft>();
  const points = useFieldArray({ control, name: `${path}.chosenPoints`, keyName: 'key' });
  const openings = useFieldArray({ control, name: `${path}.openings`, keyName: 'key' });
  return (
    <div className="grid gap-3">
      {points.fields.map((field, index) => (
        <div
          key={field.key}
          className="grid grid-cols-2 gap-2 sm:grid-cols-[6rem_6rem_1fr_auto] sm:items-end"
        >
          <PlanText path={`${path}.chosenPoints.${index}.x`} label="From left" unit={units} />
          <PlanText path={`${path}.chosenPoints.${index}.y`} label="From below" unit={units} />
          <PlanText path={`${path}.chosenPoints.${index}.reason`} label="Chosen because" />
          <Button
            variant="quiet"
            aria-label={`Remove chosen point ${index + 1}`}
            onClick={() => points.remove(index)}
          >
            Remove
          </Button>
        </div>
      ))}
      {openings.fields.map((field, index) => (
        <div
          key={field.key}
          className="grid grid-cols-2 gap-2 sm:grid-cols-[1fr_repeat(4,5.5rem)_auto] sm:items-end"
        >
          <PlanText path={`${path}.openings.${index}.name`} label="Opening" />
          <PlanText path={`${path}.openings.${index}.x`} label="From left" figure />
          <PlanText path={`${path}.openings.${index}.y`} label="From below" figure />
          <PlanText path={`${path}.openings.${index}.width`} label="Width" figure />
          <PlanText path={`${path}.openings.${index}.height`} label="Height" figure />
          <Button
            variant="quiet"
            aria-label={`Remove opening ${index + 1}`}
            onClick={() => openings.remove(index)}
          >
            Remove
          </Button>
        </div>
      ))}
      <div className="flex flex-wrap gap-2">
        <Button variant="quiet" onClick={() => points.append({ id: newKey('at'), x: '', y: '', reason: '' })}>
          Choose a point
        </Button>
        <Button
          variant="quiet"
          onClick={() =>
            openings.append({ id: newKey('hole'), name: '', x: '', y: '', width: '', height: '', depth: '' })
          }
        >
          Add an opening
        </Button>
      </div>
    </div>
  );
}
