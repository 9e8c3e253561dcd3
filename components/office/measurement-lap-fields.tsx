'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/checkbox';
import type { RuleFieldsProps } from './measurement-rule-fields';
import { equationOptions, lengthByOptions, toleranceOptions } from './measurement-words';
import type { PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';

/** How the length of a lap is found: typed from the drawing, or computed from the layer by a code. */
export function LapFields({ path, draft }: RuleFieldsProps) {
  const units = useWatch<PlanDraft, 'units'>({ name: 'units' });
  const { register } = useFormContext<PlanDraft>();
  const steel = (
    <>
      <PlanText path={`${path}.fyMpa`} label="Yield strength fy" unit="MPa" />
      <PlanText path={`${path}.fcMpa`} label="Concrete f’c" unit="MPa" />
    </>
  );
  return (
    <>
      <PlanSelect path={`${path}.lengthBy`} label="Required length" options={lengthByOptions} />
      {draft.lengthBy === 'typed' && (
        <PlanText path={`${path}.length`} label="Length" hint="Of the drawing" unit={units} />
      )}
      {draft.lengthBy === 'aci-tension' && (
        <>
          {steel}
          <PlanSelect path={`${path}.equation`} label="Development by" options={equationOptions} />
          <PlanText path={`${path}.providedOverRequired`} label="Steel provided / required" figure />
          <PlanText path={`${path}.sharePercent`} label="Share lapped together" unit="%" />
          <Checkbox label="Over 300 mm of concrete below" {...register(`${path}.topBar`)} />
          <Checkbox label="Lightweight concrete" {...register(`${path}.lightweight`)} />
          <Checkbox label="The code’s ties along the lap" {...register(`${path}.tiesAlongLap`)} />
        </>
      )}
      {draft.lengthBy === 'aci-compression' && (
        <>
          {steel}
          <PlanText
            path={`${path}.tensionLap`}
            label="Tension lap"
            hint="Needed above 80 000 psi (550 MPa)"
            optional
            unit={units}
          />
        </>
      )}
      {draft.lengthBy === 'en' && (
        <>
          <PlanText path={`${path}.strengthClass`} label="Strength class" hint="C30/37" />
          <PlanText path={`${path}.stressMpa`} label="Stress in the bar σsd" unit="MPa" />
          <PlanText path={`${path}.sharePercent`} label="Share lapped together" unit="%" />
          <Checkbox label="Good bond condition" {...register(`${path}.goodBond`)} />
        </>
      )}
      <ToleranceFields path={path} draft={draft} />
    </>
  );
}

/** What a placed lap or an embedded length may fall short by. */
export function ToleranceFields({ path, draft }: RuleFieldsProps) {
  const units = useWatch<PlanDraft, 'units'>({ name: 'units' });
  return (
    <>
      <PlanSelect path={`${path}.tolerance`} label="May fall short" options={toleranceOptions} />
      {draft.tolerance === 'own' && (
        <PlanText path={`${path}.ownMinus`} label="By" hint="Of the contract" unit={units} />
      )}
    </>
  );
}
