'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/checkbox';
import { bases } from '@/lib/inspection/plan';
import type { PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';
import { basisWords } from './state-words';

/** Units, basis, decision rule, validity, rain limit and mix: what every reading of the pour is judged by. */
export function RulesFields() {
  const { control, register } = useFormContext<PlanDraft>();
  const [units, rule] = useWatch({ control, name: ['units', 'rule'] as const });
  return (
    <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
      <PlanSelect
        path="units"
        label="Units shown"
        hint="A field gives its unit to a bare number"
        options={[
          { value: 'mm', label: 'Millimetres' },
          { value: 'in', label: 'Inches' },
        ]}
      />
      <PlanSelect
        path="basis"
        label="Acceptance basis"
        hint="The contract governs beside it"
        options={bases.map((basis) => ({ value: basis, label: basisWords[basis] }))}
      />
      <PlanSelect
        path="rule"
        label="Decision rule"
        hint="Named on every release"
        options={[
          { value: 'simple', label: 'Simple acceptance' },
          { value: 'guarded', label: 'Guarded acceptance' },
        ]}
      />
      {rule === 'guarded' && (
        <PlanText path="guard" label="Guard band" hint="Left empty: the uncertainty" optional unit={units} />
      )}
      <PlanText
        path="validityHours"
        label="A release stands for"
        hint="Until the start of placing"
        unit="h"
      />
      <PlanText path="rainLimit" label="Rain that voids it" hint="At or over this" unit="mm" />
      <PlanText path="mixName" label="Mix" hint="As ordered" optional />
      <PlanText
        path="mixAggregate"
        label="Largest aggregate"
        hint="Where a mix is named"
        optional
        unit={units}
      />
      <Checkbox label="Last walk before the release" className="self-end" {...register('lastWalk')} />
    </div>
  );
}
