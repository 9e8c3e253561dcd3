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
  const [units, rule, basis] = useWatch({ control, name: ['units', 'rule', 'basis'] as const });
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
      {basis === 'en-1992' && <EnConcrete units={units} />}
      {(basis === 'is-456' || basis === 'as-3600') && (
        <PlanText
          path="concrete.strengthMpa"
          label="Strength of the concrete"
          hint="Characteristic"
          optional
          unit="MPa"
        />
      )}
      {basis === 'as-3600' && (
        <Checkbox
          label="Membrane against the ground"
          className="self-end"
          {...register('concrete.membrane')}
        />
      )}
      <Checkbox label="Last walk before the release" className="self-end" {...register('lastWalk')} />
    </div>
  );
}

/** What EN 1992-1-1 and EN 13670 ask beside the exposure. */
function EnConcrete({ units }: { units: 'mm' | 'in' }) {
  const { register } = useFormContext<PlanDraft>();
  return (
    <>
      <PlanSelect
        path="concrete.workingLifeYears"
        label="Working life"
        hint="The structural class follows from it"
        placeholder="Not said"
        options={[
          { value: '50', label: '50 years' },
          { value: '100', label: '100 years' },
        ]}
      />
      <PlanSelect
        path="concrete.structuralClass"
        label="Structural class"
        hint="Where the contract names it"
        placeholder="By working life"
        options={(['S1', 'S2', 'S3', 'S4', 'S5', 'S6'] as const).map((value) => ({ value, label: value }))}
      />
      <PlanText path="concrete.strengthClass" label="Strength class" hint="C40/50" optional />
      <PlanSelect
        path="concrete.toleranceClass"
        label="Tolerance class"
        hint="EN 13670"
        placeholder="Not said"
        options={[
          { value: '1', label: '1' },
          { value: '2', label: '2' },
        ]}
      />
      <PlanText
        path="concrete.deltaCdev"
        label="Allowance for deviation"
        hint="Left empty: the recommended one"
        optional
        unit={units}
      />
      <Checkbox label="Slab geometry" className="self-end" {...register('concrete.slabGeometry')} />
      <Checkbox
        label="Special quality control"
        className="self-end"
        {...register('concrete.specialQualityControl')}
      />
    </>
  );
}
