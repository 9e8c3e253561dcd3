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
  /** When a change to it was recorded; null where only plans name it. */
  changedAt: string | null;
  /** Numbers of the pours whose plans in force name it. */
  pours: string[];
}

/** The registers of a project: drawings by number with their revisions, instruments, mixes (recorded ones, and those that plans name). */
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
  const recorded = tx('mixes').where({ project_id: projectId }).select('name', 'note', 'changed_at');
  const planned = tx('pours as p')
    .join('plans as l', (on) =>
      on.on('l.project_id', 'p.project_id').andOn('l.pour_id', 'p.id').andOn('l.revision', 'p.plan_revision'),
    )
    .where({ 'p.project_id': projectId })
    .whereRaw("l.document -> 'mix' ->> 'name' is not null")
    .groupByRaw("l.document -> 'mix' ->> 'name'")
    .select(
      tx.raw("l.document -> 'mix' ->> 'name' as name"),
      tx.raw('array_agg(p.number order by p.number) as pours'),
    );
  const mixes = await tx
    .with('recorded', recorded)
    .with('planned', planned)
    .from(tx.raw('recorded full join planned using (name)'))
    .orderBy('name')
    .select<MixRow[]>(
      'name',
      tx.raw("coalesce(note, '') as note"),
      'changed_at as changedAt',
      tx.raw("coalesce(pours, '{}') as pours"),
    );
  return { drawings, instruments, mixes };
}
