import { AppError } from '@/lib/inspection/app-error';
import { foldSheet } from '@/lib/inspection/sheet';
import { readReleasedPage, type ReleasedPage } from '@/db/read/released-page';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { releaseByEntry } from '@/db/stores/release-store';
import { enterProject } from '@/db/stores/session-store';
import { database, type Tx } from '@/db/connection';
import { environment } from '../environment';
import { loadFolded } from '../load-sheet';
import { writeObject } from '../object-storage';
import { certificatePdf } from './certificate';

/** Where the certificate of a release is kept. */
export const certificateKey = (releaseId: string) => `certificates/${releaseId}.pdf`;

export interface CertificateOf {
  projectId: string;
  pourId: string;
  /** Id of the release entry. */
  entryId: string;
}

interface Material {
  page: ReleasedPage;
  sheet: Sheet;
  token: string;
}

/** What a certificate says, from the record as it stood when the release was given: later entries change nothing. */
async function materialOf(tx: Tx, of: CertificateOf): Promise<Material> {
  const row = await releaseByEntry(tx, of.projectId, of.entryId);
  const page = row && (await readReleasedPage(tx, of.projectId, row.number));
  const folded = (await loadFolded(tx, of.projectId, [of.pourId])).get(of.pourId);
  if (!row || !page || !folded) throw new AppError('not-found');
  const recorded = folded.recorded.filter((entry) => (entry.seq ?? Infinity) <= page.seq);
  return { page, sheet: foldSheet(folded.plan, recorded), token: row.token };
}

function render({ page, sheet, token }: Material): Promise<Buffer> {
  // Whether it is void is looked up at the address printed on it: the certificate itself stays what was given.
  return certificatePdf({ ...page, voided: null }, sheet, `${environment().APP_URL}/released/${token}`);
}

/** Job: makes the certificate of a release and keeps it. @returns its size in bytes */
export async function writeCertificate(of: CertificateOf): Promise<number> {
  const material = await database().transaction(async (tx) => {
    await enterProject(tx, of.projectId);
    return materialOf(tx, of);
  });
  const pdf = await render(material);
  await writeObject(certificateKey(of.entryId), pdf, 'application/pdf');
  return pdf.length;
}
