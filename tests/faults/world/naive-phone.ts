import type { EntryEnvelope } from '@/lib/inspection/entry';
import type { Line } from './phone';

/** A client as one writes it in a hurry, for the negative control: whatever answer comes, what was sent is forgotten. */
export class NaivePhone {
  waiting: EntryEnvelope[] = [];

  constructor(private readonly line: Line) {}

  record(entry: EntryEnvelope): void {
    this.waiting.push(entry);
  }

  async sync(projectId: string, deviceId: string): Promise<void> {
    if (this.waiting.length === 0) return;
    try {
      await this.line('/api/sync/push', {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({
          protocol: 1,
          projectId,
          deviceId,
          sentAt: '2026-12-01T07:00:00.000Z',
          entries: this.waiting,
        }),
        signal: AbortSignal.timeout(500),
      });
      this.waiting = [];
    } catch {
      // Kept for the next try.
    }
  }
}
