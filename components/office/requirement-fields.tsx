'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import type { PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';
import { basisWords } from './state-words';

/** The required cover of one steel: what the contract asks for, and what may be less or more. */
export function RequirementFields({
  path,
  number,
  units,
  basis,
  onRemove,
}: {
  path: `elements.${number}.faces.${number}.requirements.${number}`;
  number: number;
  units: 'mm' | 'in';
  basis: PlanDraft['basis'];
  onRemove: (() => void) | null;
}) {
  const { control, register } = useFormContext<PlanDraft>();
  const deviation = useWatch({ control, name: `${path}.deviation` });
  return (
    <fieldset className="border-l-[3px] border-ink pl-3">
      <legend className="float-left mb-2 w-full font-label text-body font-semibold">
        Required cover{number > 1 ? `, steel ${number}` : ''}
      </legend>
      <div className="clear-left grid gap-3 sm:grid-cols-2">
        <PlanText
          path={`${path}.steel`}
          label="To which steel"
          hint="Outermost bar, ties, main bars of layer 2"
        />
        <PlanText path={`${path}.barDesignation`} label="Bar" hint="#5, 16 mm, 15M, N16 or IS 16" />
        <PlanText
          path={`${path}.contractSpecified`}
          label="Specified cover"
          hint={basis === 'contract' ? 'From the contract' : "Left empty: the code's minimum"}
          optional={basis !== 'contract'}
          unit={units}
        />
        <PlanSelect
          path={`${path}.deviation`}
          label="What may be less"
          hint="The contract documents govern"
          options={[
            ...(basis === 'contract' ? [] : [{ value: 'basis', label: `By ${basisWords[basis]}` }]),
            { value: 'contract', label: 'By contract: minus and plus' },
            { value: 'never-less', label: 'Never less' },
          ]}
        />
        {deviation === 'contract' && (
          <PlanText
            path={`${path}.contractMinus`}
            label="Minus"
            unit={units}
            optional={basis !== 'contract'}
          />
        )}
        <PlanSelect
          path={`${path}.bundleOf`}
          label="Bundle"
          placeholder="Single bar"
          options={['2', '3', '4'].map((value) => ({ value, label: `${value} bars together` }))}
        />
        {deviation !== 'basis' && (
          <PlanText path={`${path}.contractPlus`} label="Plus" optional unit={units} />
        )}
      </div>
      <Checkbox
        label="This is the main bar: effective depth is judged from it too"
        {...register(`${path}.mainBar`)}
      />
      {onRemove && (
        <Button variant="quiet" onClick={onRemove}>
          Remove this cover
        </Button>
      )}
    </fieldset>
  );
}
