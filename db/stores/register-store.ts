import type { BodyOf } from '@/lib/inspection/entry';
import type { Tx } from '@/db/connection';

/** The registers repeat what entries of the project's stream say, so that lists need no fold; the entries govern. */
export async function registerInstrument(
  tx: Tx,
  projectId: string,
  body: BodyOf<'instrument-status'>,
): Promise<void> {
  await tx('instruments')
    .insert({
      project_id: projectId,
      id: body.instrumentId,
      name: body.name,
      kind: body.kind,
      serial: body.serial,
      calibration_due: body.calibrationDue,
      uncertainty_mm: body.uncertaintyMm,
      in_service: body.inService,
    })
    .onConflict(['project_id', 'id'])
    .merge();
}

export async function registerDrawing(
  tx: Tx,
  projectId: string,
  body: BodyOf<'drawing-received'>,
): Promise<void> {
  await tx('drawings')
    .insert({ project_id: projectId, number: body.number, revision: body.revision, received_at: body.at })
    .onConflict(['project_id', 'number', 'revision'])
    .ignore();
}

export async function registerMix(
  tx: Tx,
  projectId: string,
  body: BodyOf<'mix-changed'>,
  at: string,
): Promise<void> {
  await tx('mixes')
    .insert({ project_id: projectId, name: body.name, note: body.text, changed_at: at })
    .onConflict(['project_id', 'name'])
    .merge();
}
