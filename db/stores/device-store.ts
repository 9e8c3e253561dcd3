import type { Tx } from '@/db/connection';

/** Notes that a person's device has sent, and the highest number it has given to an entry. */
export async function noteDevice(
  tx: Tx,
  device: { id: string; personId: string; at: string; highestDeviceSeq: number },
): Promise<void> {
  await tx.raw(
    `insert into devices (id, person_id, first_sent_at, last_sent_at, highest_device_seq)
     values (:id, :personId, :at, :at, :highestDeviceSeq)
     on conflict (person_id, id) do update set last_sent_at = excluded.last_sent_at,
       highest_device_seq = greatest(devices.highest_device_seq, excluded.highest_device_seq)`,
    device,
  );
}
