import type { Tx } from '@/db/connection';

export interface DrawingRow {
  number: string;
  revision: string;
  receivedAt: string;
}
export interface InstrumentRow {
  id: string;
  name: string;
  kind: string;
  serial: string;
  calibrationDue: string | null;
  uncertaintyMm: number | null;
  inService: boolean;
}
export interface MixRow {
  name: string;
  note: string;
  changedAt: string;
}

/** The registers of a project: drawings by number with their revisions, instruments, mixes. */
export async function readProjectRegisters(
  tx: Tx,
  projectId: string,
): Promise<{ drawings: DrawingRow[]; instruments: InstrumentRow[]; mixes: MixRow[] }> {
  const drawings = await tx('drawings')
    .where({ project_id: projectId })
    .orderBy(['number', { column: 'received_at', order: 'desc' }])
    .select<DrawingRow[]>('number', 'revision', 'received_at as receivedAt');
  const instruments = await tx('instruments')
    .where({ project_id: projectId })
    .orderBy('name')
    .select<InstrumentRow[]>(
      'id',
      'name',
      'kind',
      'serial',
      'calibration_due as calibrationDue',
      'uncertainty_mm as uncertaintyMm',
      'in_service as inService',
    );
  const mixes = await tx('mixes')
    .where({ project_id: projectId })
    .orderBy('name')
    .select<MixRow[]>('name', 'note', 'changed_at as changedAt');
  return { drawings, instruments, mixes };
}
