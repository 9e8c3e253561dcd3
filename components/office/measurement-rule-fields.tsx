'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/checkbox';
import type { MeasurementDraft } from './measurement-draft';
import { LapFields, ToleranceFields } from './measurement-lap-fields';
import { LayerSelect, SupportHeightFields } from './measurement-layer-fields';
import {
  angleOptions,
  bandOptions,
  barUseOptions,
  bendCodeOptions,
  codeOptions,
  fromOptions,
  kindOptions,
  patternOptions,
  placeOptions,
  quantityOptions,
  steelOptions,
  supportOptions,
  toOptions,
  useOptions,
} from './measurement-words';
import type { PlanDraft } from './plan-draft';
import { PlanSelect, PlanText } from './plan-field';

export interface RuleFieldsProps {
  path: `measurements.${number}`;
  draft: MeasurementDraft;
}

/** The fields that one rule asks for; the others keep what was typed in them. */
export function MeasurementRuleFields({ path, draft }: RuleFieldsProps) {
  const units = useWatch<PlanDraft, 'units'>({ name: 'units' });
  const layer = <LayerSelect path={path} field="layerId" label="Layer" elementId={draft.elementId} />;
  switch (draft.rule) {
    case 'typed':
      return <TypedFields path={path} draft={draft} />;
    case 'bar-size':
    case 'stainless-contact':
      return layer;
    case 'bar-count':
      return (
        <>
          {layer}
          <PlanText
            path={`${path}.bayWidth`}
            label="Width of the bay"
            hint="Left empty: the layer’s count"
            optional
            unit={units}
          />
          <PlanText
            path={`${path}.edge`}
            label="First bar from the edge"
            hint="To its centre"
            optional
            unit={units}
          />
        </>
      );
    case 'bar-spacing':
      return (
        <>
          {layer}
          <PlanText path={`${path}.gaps`} label="Gaps measured at once" hint="One tape length" figure />
          <PlanSelect
            path={`${path}.steel`}
            label="What they are"
            hint="For the deviation"
            options={steelOptions}
          />
          <OwnBand path={path} hint="Left empty: of the basis" />
          <PlanSelect
            path={`${path}.use`}
            label="Greatest spacing by code"
            hint="The mean keeps to it"
            placeholder="Not looked at"
            options={useOptions}
          />
        </>
      );
    case 'greatest-spacing':
      return (
        <>
          {layer}
          <PlanSelect
            path={`${path}.use`}
            label="What the bars do"
            hint="The limit follows from it"
            placeholder="Choose"
            options={useOptions}
          />
        </>
      );
    case 'clear-distance':
      return (
        <>
          {layer}
          <PlanSelect path={`${path}.place`} label="Between" options={placeOptions} />
          <PlanSelect path={`${path}.code`} label="By" options={codeOptions} />
        </>
      );
    case 'support-height':
      return <SupportHeightFields path={path} draft={draft} />;
    case 'support-spacing':
      return (
        <>
          {layer}
          <PlanSelect path={`${path}.by`} label="Limit" options={supportOptions} />
          {draft.by === 'plan' && (
            <PlanText path={`${path}.plan`} label="Greatest spacing" hint="Of the drawing" unit={units} />
          )}
        </>
      );
    case 'tie-share':
      return (
        <>
          {layer}
          <LayerSelect path={path} field="otherLayerId" label="Layer across it" elementId={draft.elementId} />
          <PlanSelect path={`${path}.pattern`} label="Pattern" options={patternOptions} />
          {draft.pattern === 'share' && (
            <PlanText path={`${path}.sharePercent`} label="Share of the crossings" unit="%" />
          )}
        </>
      );
    case 'lap-length':
      return (
        <>
          {layer}
          <LapFields path={path} draft={draft} />
        </>
      );
    case 'lap-stagger':
      return (
        <>
          <PlanText path={`${path}.lap`} label="Length of the laps" unit={units} />
          <PlanText
            path={`${path}.least`}
            label="Least stagger"
            hint="EN 1992: left empty, 0.3 of the lap"
            optional
            unit={units}
          />
        </>
      );
    case 'share-lapped':
      return (
        <>
          <PlanText path={`${path}.lap`} label="Length of the laps" unit={units} />
          <PlanSelect path={`${path}.code`} label="Section by" options={codeOptions} />
          <PlanText path={`${path}.mostPercent`} label="At most lapped together" unit="%" />
        </>
      );
    case 'coupler':
      return (
        <>
          <PlanText path={`${path}.type`} label="Type on the drawing" />
          <PlanText
            path={`${path}.mostThreads`}
            label="Threads in sight"
            hint="At most; left empty: not counted"
            optional
            figure
          />
        </>
      );
    case 'embedment':
      return (
        <>
          {layer}
          <PlanText path={`${path}.length`} label="Embedded length" hint="Of the drawing" unit={units} />
          <ToleranceFields path={path} draft={draft} />
          <TickBox path={`${path}.starter`} label="Starters: each is pulled" />
        </>
      );
    case 'bend-diameter':
      return (
        <>
          {layer}
          <PlanSelect path={`${path}.bendCode`} label="By" options={bendCodeOptions} />
          <PlanSelect path={`${path}.barUse`} label="What is bent" options={barUseOptions} />
        </>
      );
    case 'hook-extension':
      return (
        <>
          {layer}
          <PlanSelect path={`${path}.barUse`} label="What is bent" options={barUseOptions} />
          <PlanSelect path={`${path}.angle`} label="Hook" options={angleOptions} />
        </>
      );
    case 'coating-damage':
      return (
        <>
          {layer}
          <PlanText
            path={`${path}.damagedMostPercent`}
            label="Damaged in any foot"
            hint="Left empty: ASTM D3963"
            optional
            unit="%"
          />
          <PlanText
            path={`${path}.patchedMostPercent`}
            label="Patched in any foot"
            hint="Left empty: ASTM D3963"
            optional
            unit="%"
          />
        </>
      );
    case 'frp-damage':
      return (
        <>
          {layer}
          <PlanText
            path={`${path}.mostPercent`}
            label="Damaged in any metre"
            hint="Left empty: ACI 440.5M"
            optional
            unit="%"
          />
        </>
      );
    case 'tendon-height':
      return (
        <>
          <PlanText path={`${path}.height`} label="Height" hint="At this point" unit={units} />
          <PlanSelect path={`${path}.from`} label="Taken" options={fromOptions} />
          <PlanSelect path={`${path}.to`} label="Of the tendon" options={toOptions} />
          <PlanSelect path={`${path}.band`} label="Band" options={bandOptions} />
          {draft.band === 'own' && <OwnBand path={path} />}
        </>
      );
    case 'fibre-dosage':
      return (
        <>
          <PlanText path={`${path}.fibreType`} label="Fibre" hint="As the ticket names it" />
          <PlanText path={`${path}.kgPerM3`} label="Dosage" unit="kg/m³" />
          <PlanText path={`${path}.minusPercent`} label="May fall short by" unit="%" />
        </>
      );
  }
}

function OwnBand({ path, hint }: { path: RuleFieldsProps['path']; hint?: string }) {
  const units = useWatch<PlanDraft, 'units'>({ name: 'units' });
  const both = { hint: hint ?? 'Of the contract', optional: hint !== undefined, unit: units };
  return (
    <>
      <PlanText path={`${path}.ownMinus`} label="Deviation minus" {...both} />
      <PlanText path={`${path}.ownPlus`} label="Deviation plus" {...both} />
    </>
  );
}

function TypedFields({ path, draft }: RuleFieldsProps) {
  const units = useWatch<PlanDraft, 'units'>({ name: 'units' });
  const unit = draft.quantity === 'length' ? units : draft.quantity === 'share' ? '%' : undefined;
  return (
    <>
      <PlanSelect path={`${path}.kind`} label="About" options={kindOptions} />
      <PlanSelect path={`${path}.quantity`} label="What is measured" options={quantityOptions} />
      {draft.quantity === 'designation' ? (
        <PlanText path={`${path}.expected`} label="Bar planned" />
      ) : (
        <>
          <PlanText path={`${path}.least`} label="At least" optional unit={unit} figure />
          <PlanText path={`${path}.most`} label="At most" optional unit={unit} figure />
        </>
      )}
    </>
  );
}

function TickBox({ path, label }: { path: `${RuleFieldsProps['path']}.starter`; label: string }) {
  const { register } = useFormContext<PlanDraft>();
  return <Checkbox label={label} className="self-end" {...register(path)} />;
}
