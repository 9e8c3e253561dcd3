'use client';

import { useDeferredValue, useMemo } from 'react';
import { useWatch } from 'react-hook-form';
import { limitWords } from '@/lib/inspection/measured-words';
import { previewMeasurement, type MeasurementSources } from './measurement-preview-plan';
import type { PlanDraft } from './plan-draft';
import { TrailSteps } from './trail-steps';

const sources = [
  'units',
  'basis',
  'mixName',
  'mixAggregate',
  'concrete',
  'elements',
  'measurements',
] as const;

/** The limits of one measurement as they would be frozen now, with where each number comes from. */
export function MeasurementPreview({ index }: { index: number }) {
  const [units, basis, mixName, mixAggregate, concrete, elements, measurements] = useWatch<
    PlanDraft,
    typeof sources
  >({ name: sources });
  const text = useDeferredValue(
    JSON.stringify({ units, basis, mixName, mixAggregate, concrete, elements, measurements }),
  );
  const preview = useMemo(
    () => previewMeasurement(JSON.parse(text) as MeasurementSources, index),
    [text, index],
  );
  if (preview.kind === 'waiting') {
    return (
      <div className="self-start border border-dashed border-pencil p-3 text-body text-pencil">
        {preview.sentence && <p>{preview.sentence}</p>}
        <p>Its limits are shown here.</p>
      </div>
    );
  }
  return (
    <div className="grid content-start gap-1">
      <p role="status" className="font-label font-semibold">
        Accepted: {limitWords(preview.item, units)}
      </p>
      <TrailSteps trail={preview.item.trail} />
    </div>
  );
}
