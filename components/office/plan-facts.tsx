import { formatLength } from '@/lib/concrete/length';
import type { Plan } from '@/lib/inspection/plan';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { personName } from './entry-words';
import { Fold } from './fold';
import type { OfficeViewer } from './office-viewer';
import { fullTime } from './project-time';
import { RuledTable } from './ruled-table';
import { basisWords, decisionRuleWords, elementTypeWords } from './state-words';

/** What the plan says beside its faces: rules, layers, mix, and how it came to this revision. */
export function PlanFacts({
  plan,
  revisions,
  viewer,
}: {
  plan: Plan;
  revisions: readonly {
    revision: number;
    issuedAt: string;
    authorId: string;
    reason: string;
    digest: string;
  }[];
  viewer: OfficeViewer;
}) {
  const show = (mm: number) => `${formatLength(mm, plan.units)} ${plan.units}`;
  const layers = plan.elements.flatMap((element) => element.layers.map((layer) => ({ element, layer })));
  return (
    <div className="grid gap-4 *:min-w-0">
      <dl className="grid gap-x-6 sm:grid-cols-[max-content_1fr] sm:gap-y-1">
        <Fact label="Acceptance basis">{basisWords[plan.basis]}</Fact>
        <Fact label="Decision rule">{decisionRuleWords(plan.decisionRule)}</Fact>
        <Fact label="Validity of a release">{plan.validityHours} h, until the start of placing</Fact>
        <Fact label="Rain limit">{formatLength(plan.rainLimitMm, 'mm')} mm</Fact>
        <Fact label="Mix">
          {plan.mix ? `${plan.mix.name}, aggregate to ${show(plan.mix.aggregateMm)}` : 'not named'}
        </Fact>
        {plan.elements.map((element) => (
          <Fact key={element.id} label={element.mark}>
            {elementTypeWords[element.type]}, {element.location}
            {element.level && `, level ${element.level}`}, thickness {show(element.thicknessMm)}, drawing{' '}
            {element.drawing.number} rev {element.drawing.revision}
          </Fact>
        ))}
      </dl>
      {layers.length > 0 && (
        <Fold summary="Layers" aside={`${layers.length}`}>
          <RuledTable
            caption="Layers"
            captionHidden
            columns={[
              { key: 'element', head: 'Element' },
              { key: 'layer', head: 'Layer' },
              { key: 'face', head: 'From face' },
              { key: 'order', head: 'Order', figure: true },
              { key: 'bar', head: 'Bar', figure: true },
              { key: 'spacing', head: 'Spacing or count', figure: true },
              { key: 'direction', head: 'Direction' },
            ]}
            rows={layers.map(({ element, layer }) => ({
              key: layer.id,
              cells: {
                element: element.mark,
                layer: layer.name,
                face: element.faces.find((face) => face.id === layer.faceId)?.name ?? '–',
                order: layer.order,
                bar: layer.barDesignation,
                spacing: layer.spacingMm !== null ? show(layer.spacingMm) : (layer.count ?? '–'),
                direction: layer.direction,
              },
            }))}
          />
        </Fold>
      )}
      <Fold summary="Revisions of the plan" aside={`${revisions.length}`}>
        <RuledTable
          caption="Revisions of the plan"
          captionHidden
          columns={[
            { key: 'revision', head: 'Revision' },
            { key: 'when', head: 'Issued', className: 'whitespace-nowrap print:whitespace-normal' },
            { key: 'by', head: 'By' },
            { key: 'reason', head: 'Why', className: 'min-w-48' },
            { key: 'digest', head: 'Digest', figure: true },
          ]}
          rows={[...revisions].reverse().map((one) => ({
            key: String(one.revision),
            cells: {
              revision: revisionLetter(one.revision),
              when: fullTime(one.issuedAt, viewer.timeZone),
              by: personName(one.authorId, viewer.people),
              reason: one.reason,
              digest: one.digest.slice(0, 12),
            },
          }))}
        />
      </Fold>
    </div>
  );
}

function Fact({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <>
      <dt className="font-label font-medium text-pencil max-sm:text-label">{label}</dt>
      <dd className="min-w-0 max-sm:pb-1.5">{children}</dd>
    </>
  );
}
