import { withUnit } from '@/lib/concrete/length';
import type { DecisionRule } from '@/lib/inspection/plan';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { inScope } from '@/lib/inspection/scope';
import type { MarkKind, PointState, Sheet } from '@/lib/inspection/sheet-types';
import type { ReleasedPage } from '@/db/read/released-page';
import { PdfSheet } from './pdf-sheet';

const markWords: Record<MarkKind, string> = {
  met: 'met',
  'met-flagged': 'met, at limit or inside uncertainty',
  'not-met-low': 'not met, low',
  'not-met-high': 'not met, high',
  'not-verified': 'not verified',
  unread: 'not read',
};

const ruleWords = (rule: DecisionRule): string =>
  rule.kind === 'simple'
    ? 'Simple acceptance: a reading is met at or above the least accepted cover; measuring uncertainty is shown and does not decide.'
    : `Guarded acceptance (JCGM 106:2012): a reading is met only with a guard band${rule.guardMm === undefined ? ' of the instrument’s expanded uncertainty' : ` of ${rule.guardMm} mm`} to spare.`;

const CAUTION =
  'At the points read and for the items checked. Formwork, shoring and the authority’s own inspection are not covered unless signed for. The contract documents and the local code govern; nothing here replaces the required inspection by qualified people, and no statement is made that the structure is safe.';

/**
 * The release certificate as PDF: what was released, on what it rests, by whom, and every reading with its verdict.
 * @param sheet the sheet as it was when the release was given
 */
export function certificatePdf(page: ReleasedPage, sheet: Sheet, publicUrl: string): Promise<Buffer> {
  const time = new Intl.DateTimeFormat('en-GB', {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    timeZone: page.timeZone,
  });
  const at = (iso: string) => `${time.format(new Date(iso))}`;
  const accepted = acceptedPoints(sheet, page.body.scope);
  const document = new PdfSheet(
    [
      { label: 'Pour', value: page.pour.number },
      { label: 'Element and location', value: `${page.pour.title}, ${page.pour.location}`, grow: 3 },
      { label: 'Plan', value: `rev ${revisionLetter(page.body.planRevision)}` },
      { label: 'Release', value: `No. ${page.number}` },
    ],
    CAUTION,
    `Release ${page.number}, ${page.pour.number}`,
  );
  document
    .heading('Release certificate')
    .statement(
      accepted.length === 0
        ? 'Conforming at the points read and for the items checked'
        : `Conforming, but for ${accepted.length === 1 ? 'one point' : `${accepted.length} points`}: not conforming, accepted by the engineer of record`,
      accepted.length === 0 ? 'met' : 'hold',
    )
    .facts([
      ['Project', `${page.projectName}${page.place ? `, ${page.place}` : ''}`],
      ['Scope', scopeWords(page)],
      ['Released', `${at(page.releasedAt)} by ${page.releasedByName}`],
      ['Valid until', `the start of placing, at the latest ${at(page.validUntil)} (${page.timeZone})`],
      ['Drawings', page.body.drawings.join(', ')],
      ['Mix', page.body.mix ?? 'not named'],
      ['Readings', String(page.body.readings)],
      ['Decision rule', ruleWords(page.decisionRule)],
      [
        'Decisions it rests on',
        page.body.dispositionIds.length === 0 ? 'none' : String(page.body.dispositionIds.length),
      ],
      ['Sheet digest', page.body.sheetDigest],
      ['Head of the record', page.body.headHash ?? 'none'],
      ['Hash of this entry', page.entryHash],
      ['Look it up', publicUrl],
    ]);
  if (page.voided) document.statement(`Void since ${at(page.voided.at)}: ${page.voided.reason}`, 'hold');
  document.heading('Signed by').table(
    ['Name', 'As', 'Licence or certification', 'When'],
    page.signers.map((signer) => ({
      cells: [
        signer.name,
        signer.role,
        signer.licence || signer.certification || 'none on file',
        at(signer.at),
      ],
    })),
    [3, 2, 3, 3],
  );
  if (page.body.conditions.length > 0) {
    document.heading('Conditions during placing');
    for (const condition of page.body.conditions) document.paragraph(condition);
  }
  readings(document, sheet, page.body.scope);
  checks(document, sheet);
  return document.finish();
}

function scopeWords(page: ReleasedPage): string {
  if (page.scopeMarks === null) return 'The whole pour';
  return `${page.scopeMarks.join(', ')}. Limits: ${page.body.scope.limits}`;
}

function acceptedPoints(sheet: Sheet, scope: ReleasedPage['body']['scope']): PointState[] {
  return sheet.faces
    .filter((face) => inScope([face.elementId], scope))
    .flatMap((face) => [...face.points, ...face.spots])
    .filter((point) => point.governing.some((reading) => reading.judged.verdict === 'not-met'));
}

function readings(document: PdfSheet, sheet: Sheet, scope: ReleasedPage['body']['scope']): void {
  const { units } = sheet.plan;
  for (const state of sheet.faces.filter((face) => inScope([face.elementId], scope))) {
    const element = sheet.plan.elements.find((one) => one.id === state.elementId);
    const face = element?.faces.find((one) => one.id === state.faceId);
    if (!element || !face) continue;
    document.heading(`Cover: ${element.mark}, ${face.name}`);
    for (const requirement of face.requirements) {
      const most =
        requirement.mostAcceptedMm === null ? '' : ` to ${withUnit(requirement.mostAcceptedMm, units)}`;
      document.paragraph(
        `To ${requirement.steel}: specified ${withUnit(requirement.specifiedMm, units)}, accepted from ${withUnit(requirement.leastAcceptedMm, units)}${most}.`,
        'pencil',
      );
    }
    const rows = [...state.points, ...state.spots].flatMap((point) =>
      point.governing.map((reading) => {
        const mm = reading.current?.value?.mm ?? null;
        const failed = reading.judged.verdict === 'not-met';
        return {
          cells: [
            point.label,
            mm === null ? 'block' : withUnit(mm, units, reading.requirement?.leastAcceptedMm),
            `${markWords[point.mark]}${failed ? '; accepted by the engineer of record' : ''}`,
            reading.current?.steel ?? '',
            String(reading.round),
          ],
          ...(failed ? { colour: 'hold' as const } : {}),
        };
      }),
    );
    document.table(['Point', 'Cover', 'Verdict', 'To', 'Round'], rows, [1, 1.4, 4, 2.4, 0.8], [1]);
  }
}

function checks(document: PdfSheet, sheet: Sheet): void {
  const words = { met: 'met', 'not-met': 'not met', 'not-applicable': 'does not apply' } as const;
  document.heading('Checks').table(
    ['Question', 'Answer'],
    sheet.checks.map((check) => ({
      cells: [
        check.item.question,
        check.governing
          ? `${words[check.governing.body.answer]}${check.governing.body.reason ? `: ${check.governing.body.reason}` : ''}`
          : 'not answered',
      ],
    })),
    [5, 2],
  );
}
