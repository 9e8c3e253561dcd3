'use client';

import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { emptyLayer, type PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';

const coatings = [
  { value: 'none', label: 'none' },
  { value: 'epoxy', label: 'epoxy' },
  { value: 'galvanised', label: 'galvanised' },
  { value: 'stainless', label: 'stainless' },
  { value: 'frp', label: 'fibre-reinforced polymer' },
];

/** Layers of an element in order from the face that they belong to, outermost first. */
export function LayerFields({ elementIndex }: { elementIndex: number }) {
  const path = `elements.${elementIndex}.layers` as const;
  const { control } = useFormContext<PlanDraft>();
  const [units, faces] = useWatch({ control, name: ['units', `elements.${elementIndex}.faces`] as const });
  const layers = useFieldArray({ control, name: path, keyName: 'key' });
  return (
    <div className="grid gap-3 border-t border-rule pt-3">
      <h3 className="text-lead">Layers</h3>
      {layers.fields.map((field, index) => (
        <fieldset key={field.key} className="border-b border-rule pb-3">
          <legend className="sr-only">Layer {index + 1}</legend>
          <div className="grid grid-cols-2 gap-2 sm:grid-cols-3 lg:grid-cols-5">
            <PlanText path={`${path}.${index}.name`} label="Layer" hint="B1, T2" />
            <PlanSelect
              path={`${path}.${index}.faceId`}
              label="From face"
              hint="Counted from it"
              options={faces.map((face, at) => ({ value: face.id, label: face.name || `face ${at + 1}` }))}
            />
            <PlanText path={`${path}.${index}.order`} label="Order" hint="1 is outermost" figure />
            <PlanText path={`${path}.${index}.barDesignation`} label="Bar" hint="#5, 16 mm, 15M" />
            <PlanText path={`${path}.${index}.direction`} label="Direction" hint="Along grid A" />
            <PlanText path={`${path}.${index}.spacing`} label="Spacing" optional unit={units} />
            <PlanText path={`${path}.${index}.count`} label="or count" optional figure />
            <PlanText path={`${path}.${index}.grade`} label="Grade" optional />
            <PlanSelect path={`${path}.${index}.coating`} label="Coating" options={coatings} />
            <div className="self-end">
              <Button
                variant="quiet"
                aria-label={`Remove layer ${index + 1}`}
                onClick={() => layers.remove(index)}
              >
                Remove
              </Button>
            </div>
          </div>
        </fieldset>
      ))}
      <div>
        <Button
          variant="quiet"
          onClick={() => layers.append(emptyLayer(faces[0]?.id ?? '', layers.fields.length + 1))}
        >
          Add a layer
        </Button>
      </div>
    </div>
  );
}
