'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/checkbox';
import { FieldError } from '@/components/ui/field';
import type { RuleFieldsProps } from './measurement-rule-fields';
import type { PlanDraft } from './plan-draft';
import { PlanSelect, PlanText, useProblem } from './plan-field';

/** The section that the height of a support follows from: what is above it, and what is below. */
export function SupportHeightFields({ path, draft }: RuleFieldsProps) {
  const [units, elements] = useWatch<PlanDraft, ['units', 'elements']>({ name: ['units', 'elements'] });
  const faces = (elements.find((one) => one.id === draft.elementId)?.faces ?? []).map((face, at) => ({
    value: face.id,
    label: face.name || `face ${at + 1}`,
  }));
  return (
    <>
      <PlanSelect
        path={`${path}.faceId`}
        label="Upper face"
        hint="Whose cover it keeps"
        placeholder="Choose"
        options={faces}
      />
      <LayerTicks
        path={path}
        field="carriedLayerIds"
        legend="Layers it carries"
        elementId={draft.elementId}
      />
      <LayerTicks
        path={path}
        field="standsOnLayerIds"
        legend="Layers it stands on"
        elementId={draft.elementId}
      />
      <PlanSelect
        path={`${path}.standsOnFaceId`}
        label="Cover below them"
        hint="Of this face"
        placeholder="Stands on the form"
        options={faces}
      />
      <PlanText path={`${path}.other`} label="Anything else below it" optional unit={units} />
      <PlanText
        path={`${path}.ownMinus`}
        label="May be too low by"
        hint="Left empty: what the effective depth may lose"
        optional
        unit={units}
      />
    </>
  );
}

function useLayers(elementId: string) {
  const elements = useWatch<PlanDraft, 'elements'>({ name: 'elements' });
  return (elements.find((one) => one.id === elementId)?.layers ?? []).map((layer, at) => ({
    value: layer.id,
    label: [layer.name || `layer ${at + 1}`, layer.barDesignation].filter(Boolean).join(', '),
  }));
}

/** One layer of the element measured. */
export function LayerSelect({
  path,
  field,
  label,
  elementId,
}: {
  path: RuleFieldsProps['path'];
  field: 'layerId' | 'otherLayerId';
  label: string;
  elementId: string;
}) {
  const layers = useLayers(elementId);
  return (
    <PlanSelect
      path={`${path}.${field}`}
      label={label}
      hint={layers.length === 0 ? 'Add layers to the element first' : undefined}
      placeholder="Choose"
      options={layers}
    />
  );
}

function LayerTicks({
  path,
  field,
  legend,
  elementId,
}: {
  path: RuleFieldsProps['path'];
  field: 'carriedLayerIds' | 'standsOnLayerIds';
  legend: string;
  elementId: string;
}) {
  const { register } = useFormContext<PlanDraft>();
  const layers = useLayers(elementId);
  const problem = useProblem(`${path}.${field}`);
  const name = `${path}.${field}` as const;
  return (
    <fieldset aria-describedby={problem ? `${name}-error` : undefined}>
      <legend className="font-label text-label font-semibold">{legend}</legend>
      {layers.length === 0 && <p className="text-label text-pencil">Add layers to the element first.</p>}
      {layers.map(({ value, label }) => (
        <Checkbox key={value} label={label} value={value} {...register(name)} />
      ))}
      <FieldError id={name} error={problem} />
    </fieldset>
  );
}
