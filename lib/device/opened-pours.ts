import type { CrewPour, OpenPour } from './device-types';
import type { PersonWork } from './person-work';
import { pourOf, projectOf } from './snapshot-of';

/** What of an opened pour is compared by its content. */
const restOf = ({ pour, project, crew }: OpenPour): string =>
  JSON.stringify([
    pour,
    project,
    crew?.list?.digest,
    crew?.headSeq,
    crew?.own.map((one) => [one.id, one.seq]),
  ]);

function crewPourOf(work: PersonWork, pourId: string): CrewPour {
  const own = work.memory
    .entriesOf(pourId)
    .filter((entry) => entry.authorId === work.person.id)
    .flatMap((entry) => {
      const read = work.reader?.(entry);
      return read?.kind === 'known' ? [read.entry] : [];
    })
    .sort((a, b) => a.deviceSeq - b.deviceSeq);
  return { list: work.crewLists.get(pourId) ?? null, headSeq: work.memory.headOf(pourId) ?? 0, own };
}

/** The pours that screens look at: the same object as long as nothing in it changed. */
export class OpenedPours {
  #opened = new Map<string, { version: number; open: OpenPour }>();
  /** Pours that could not be read: not tried again before the page is loaded anew, which brings what is missing. */
  readonly #failed = new Set<string>();

  /** Did this pour turn out not to open on this device as it is now? */
  failed(pourId: string): boolean {
    return this.#failed.has(pourId);
  }

  forget(pourId?: string): void {
    if (pourId === undefined) this.#opened = new Map();
    else this.#opened.delete(pourId);
  }

  /**
   * A pour as it is now; undefined while it is being read from the store.
   * @param version rises with every change on the device
   * @param read called once it has been read
   */
  get(
    work: PersonWork,
    pourId: string,
    { version, now, read }: { version: number; now: number; read: () => void },
  ): OpenPour | undefined {
    const project = work.projectOf(pourId);
    if (!project) return undefined;
    const folded = work.memory.folded(pourId, now);
    if (!folded) {
      if (this.#failed.has(pourId)) return undefined;
      void work.openPour(pourId, project.id).then(read, () => {
        // A store that was closed under it, since the device changed hands, says nothing of the pour.
        if (work.closed) return;
        this.#failed.add(pourId);
        read();
      });
      return undefined;
    }
    const known = this.#opened.get(pourId);
    const sameSheet = known?.open.sheet === folded.sheet && known.open.holds === folded.holds;
    if (known && sameSheet && known.version === version) return known.open;
    const pour = pourOf(work, project.id, pourId, now);
    if (!pour) return undefined;
    const crew = project.role === 'crew' ? crewPourOf(work, pourId) : null;
    const open: OpenPour = { pour, project: projectOf(project), ...folded, crew };
    const same = known && sameSheet && restOf(known.open) === restOf(open);
    this.#opened.set(pourId, { version, open: same ? known.open : open });
    return same ? known.open : open;
  }
}
