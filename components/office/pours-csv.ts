import { revisionLetter } from '@/lib/inspection/revision-letter';
import { pourStateWords } from '@/lib/inspection/pour-state';
import { roleWords, roles } from '@/lib/inspection/roles';
import { csvText } from './csv-text';
import type { ListedPour } from './pours-table';
import { localFieldText } from './project-time';

/** The list of pours for a spreadsheet; times are the project's own. */
export function poursCsv(pours: readonly ListedPour[], timeZone: string): string {
  return csvText([
    [
      'Pour',
      'Title',
      'Location',
      `Planned (${timeZone})`,
      'Plan revision',
      'State',
      'Holds',
      ...roles.map((role) => `Holds: ${roleWords[role].toLowerCase()}`),
      'Points read',
      'Points',
      'Not met',
      'Readings',
      'Release',
    ],
    ...pours.map((pour) => [
      pour.number,
      pour.title,
      pour.location,
      pour.plannedAt ? localFieldText(pour.plannedAt, timeZone).replace('T', ' ') : '',
      pour.planRevision > 0 ? revisionLetter(pour.planRevision) : '',
      pourStateWords[pour.state],
      String(pour.holdsTotal),
      ...roles.map((role) => String(pour.holdsByRole[role] ?? 0)),
      String(pour.pointsRead),
      String(pour.pointsTotal),
      String(pour.notMet),
      String(pour.readings),
      pour.releaseNumber === null ? '' : String(pour.releaseNumber),
    ]),
  ]);
}
