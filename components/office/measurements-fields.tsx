'use client';

import { useState } from 'react';
import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { Select } from '@/components/ui/select';
import { measurementRule, type MeasurementRule } from '@/lib/inspection/measurement-rule';
import { emptyMeasurement } from './measurement-draft';
import { canBeLoaded, defaultTitle } from './measurement-from-draft';
import { MeasurementPreview } from './measurement-preview';
import { MeasurementRuleFields } from './measurement-rule-fields';
import { measurementGroups, measurementRules } from './measurement-words';
import { newKey, type PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';

type Rule = MeasurementRule['rule'];
const isRule = (value: string): value is Rule =>
  measurementRule.options.some((option) => option.shape.rule.value === value);

/** What has to be measured beside cover: each with the rule that gives its limits, and the limits that follow, live. */
export function MeasurementsFields() {
  const { control, getValues } = useFormContext<PlanDraft>();
  const measurements = useFieldArray({ control, name: 'measurements', keyName: 'key' });
  const [rule, setRule] = useState<Rule>('lap-length');
  const add = () => {
    const { elements, basis } = getValues();
    measurements.append(emptyMeasurement(newKey('m'), rule, elements[0]?.id ?? '', basis));
  };
  return (
    <div className="grid gap-4">
      {measurements.fields.length === 0 && (
        <p className="text-pencil">
          Nothing is asked for yet. What is asked for here holds the pour until it is measured and met.
        </p>
      )}
      {measurements.fields.map((field, index) => (
        <OneMeasurement key={field.key} index={index} onRemove={() => measurements.remove(index)} />
      ))}
      <div className="flex flex-wrap items-end gap-3">
        <Select
          label="What to measure"
          value={rule}
          onChange={(event) => {
            if (isRule(event.target.value)) setRule(event.target.value);
          }}
          fieldClassName="w-full max-w-sm"
        >
          {measurementGroups.map(({ group, rules }) => (
            <optgroup key={group} label={group}>
              {rules.map((one) => (
                <option key={one} value={one}>
                  {measurementRules[one].name}
                </option>
              ))}
            </optgroup>
          ))}
        </Select>
        <Button onClick={add}>Add it</Button>
      </div>
    </div>
  );
}

function OneMeasurement({ index, onRemove }: { index: number; onRemove: () => void }) {
  const path = `measurements.${index}` as const;
  const { control, register } = useFormContext<PlanDraft>();
  const [draft, elements] = useWatch({ control, name: [path, 'elements'] as const });
  const untitled = defaultTitle(draft, elements);
  const name = draft.title || untitled;
  return (
    <fieldset className="grid gap-4 border-t border-rule pt-3 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
      <legend className="float-left w-full font-label text-lead font-semibold lg:col-span-2">{name}</legend>
      <div className="grid content-start gap-3">
        <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3">
          <PlanText path={`${path}.title`} label="Title" hint={`Left empty: ${untitled}`} optional />
          <PlanSelect
            path={`${path}.elementId`}
            label="Element"
            hint="Where it is measured"
            placeholder="Choose"
            options={elements.map((one, at) => ({ value: one.id, label: one.mark || `element ${at + 1}` }))}
          />
          <PlanText path={`${path}.required`} label="Places" hint="How many have to be measured" figure />
          <MeasurementRuleFields path={path} draft={draft} />
        </div>
        {canBeLoaded(draft) && (
          <Checkbox
            label="Measured before, under and after a person’s weight"
            {...register(`${path}.loaded`)}
          />
        )}
        <div>
          <Button variant="quiet" aria-label={`Remove ${name}`} onClick={onRemove}>
            Remove
          </Button>
        </div>
      </div>
      <MeasurementPreview index={index} />
    </fieldset>
  );
}
