'use client';

import { useDeferredValue, useMemo } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import { CoverSection } from '@/components/drawings/cover-section';
import { FaceMap } from '@/components/drawings/face-map';
import { formatLength } from '@/lib/concrete/length';
import { EXAMPLE_POUR, previewFace } from './face-preview-plan';
import type { PlanDraft } from './plan-draft';
import { requirementWords } from './reading-words';
import { TrailBody } from './requirement-trail';

/** What is typed of a face, as it would be issued: its limits with their trail, and its points where they would be. */
export function FacePreview({
  elementIndex,
  faceIndex,
  pourId,
}: {
  elementIndex: number;
  faceIndex: number;
  pourId: string | null;
}) {
  const { control } = useFormContext<PlanDraft>();
  const [element, units, basis, mixName, mixAggregate, concrete] = useWatch({
    control,
    name: [`elements.${elementIndex}`, 'units', 'basis', 'mixName', 'mixAggregate', 'concrete'] as const,
  });
  const text = useDeferredValue(JSON.stringify({ element, units, basis, mixName, mixAggregate, concrete }));
  const preview = useMemo(() => {
    const typed = JSON.parse(text) as { element: PlanDraft['elements'][number] } & Pick<
      PlanDraft,
      'units' | 'basis' | 'mixName' | 'mixAggregate' | 'concrete'
    >;
    return previewFace(typed.element, faceIndex, typed, pourId ?? EXAMPLE_POUR);
  }, [text, faceIndex, pourId]);

  if (preview.kind === 'waiting') {
    return (
      <div className="self-start border border-dashed border-pencil p-3 text-body text-pencil">
        {preview.sentences.map((sentence) => (
          <p key={sentence}>{sentence}</p>
        ))}
        <p>The limits and the reading points are drawn here.</p>
      </div>
    );
  }
  const { face } = preview;
  const drawn = face.points.filter((point) => point.kind === 'drawn').length;
  return (
    <div className="grid content-start gap-3 *:min-w-0">
      {face.requirements.map((requirement) => (
        <div key={requirement.id} className="grid gap-1">
          <p role="status" className="font-label font-semibold">
            {requirement.steel}: {requirementWords(requirement, units)}
          </p>
          <CoverSection
            name={face.name}
            unit={units}
            specifiedMm={requirement.specifiedMm}
            leastAcceptedMm={requirement.leastAcceptedMm}
            mostAcceptedMm={requirement.mostAcceptedMm}
            meeting={face.meeting}
            barDiameterMm={requirement.barDiameterMm}
            format={(mm) => formatLength(mm, units, requirement.leastAcceptedMm)}
            readings={[{ label: 'as drawn', mm: requirement.specifiedMm, mark: 'unread' }]}
          />
          <details>
            <summary className="min-h-6 w-fit font-label text-label font-semibold text-chalk">
              Where these limits come from
            </summary>
            <TrailBody requirement={requirement} units={units} />
          </details>
          {requirement.warnings.map((warning) => (
            <p key={warning} className="border-l-[6px] border-watch pl-2 text-label">
              {warning}
            </p>
          ))}
        </div>
      ))}
      <FaceMap
        name={face.name}
        widthMm={face.widthMm}
        heightMm={face.heightMm}
        openings={face.openings}
        recesses={face.recesses}
        format={(mm) => formatLength(mm, units)}
        points={face.points.map((point) => ({ ...point, mark: 'unread', chosen: point.kind === 'chosen' }))}
      />
      <p className="text-label text-pencil">
        {drawn} drawn, {face.points.length - drawn} chosen points.
        {pourId === null && ' Their places are drawn when the plan is issued; these are an example.'}
      </p>
    </div>
  );
}
