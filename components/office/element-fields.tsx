'use client';

import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { elementTypes } from '@/lib/inspection/plan';
import { FaceFields } from './face-fields';
import { LayerFields } from './layer-fields';
import { emptyFace, type PlanDraft } from './plan-draft';
import { PlanSelect, PlanText, useProblem } from './plan-field';
import { elementTypeWords } from './state-words';

/** One element of the pour with its faces and layers. */
export function ElementFields({
  elementIndex,
  pourId,
  onRemove,
}: {
  elementIndex: number;
  pourId: string | null;
  onRemove: (() => void) | null;
}) {
  const path = `elements.${elementIndex}` as const;
  const { control } = useFormContext<PlanDraft>();
  const [units, mark] = useWatch({ control, name: ['units', `${path}.mark`] as const });
  const faces = useFieldArray({ control, name: `${path}.faces`, keyName: 'key' });
  const problem = useProblem(`${path}.faces`);
  return (
    <fieldset className="grid gap-4">
      <legend className="sr-only">Element {mark || elementIndex + 1}</legend>
      <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
        <PlanSelect
          path={`${path}.type`}
          label="Element"
          hint="What is cast"
          options={elementTypes.map((type) => ({ value: type, label: elementTypeWords[type] }))}
        />
        <PlanText path={`${path}.mark`} label="Mark" hint="As on the drawing" />
        <PlanText path={`${path}.location`} label="Location" hint="Grid lines" />
        <PlanText path={`${path}.level`} label="Level" hint="Above datum" optional />
        <PlanText path={`${path}.thickness`} label="Thickness or depth" unit={units} />
        <PlanText path={`${path}.effectiveDepth`} label="Effective depth as planned" optional unit={units} />
        <PlanText path={`${path}.drawing.number`} label="Drawing" />
        <PlanText path={`${path}.drawing.revision`} label="Its revision" />
      </div>
      {faces.fields.map((field, index) => (
        <FaceFields
          key={field.key}
          elementIndex={elementIndex}
          faceIndex={index}
          pourId={pourId}
          onRemove={faces.fields.length > 1 ? () => faces.remove(index) : null}
        />
      ))}
      {problem && (
        <p role="alert" className="text-hold">
          {problem}
        </p>
      )}
      <LayerFields elementIndex={elementIndex} />
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => faces.append(emptyFace())}>Add a face</Button>
        {onRemove && (
          <Button variant="quiet" onClick={onRemove}>
            Remove this element
          </Button>
        )}
      </div>
    </fieldset>
  );
}
