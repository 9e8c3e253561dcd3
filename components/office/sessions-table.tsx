import { deviceWords } from './device-words';
import { fullTime } from './project-time';
import { RuledTable } from './ruled-table';

/** Where a person is signed in, latest first as given. */
export function SessionsTable({
  caption,
  sessions,
  current,
  timeZone,
}: {
  caption: string;
  sessions: readonly {
    id: string;
    userAgent: string;
    lastSeenAt: string;
    createdAt: string;
    address: string;
  }[];
  /** The session that asks. */
  current: string;
  timeZone: string;
}) {
  return (
    <RuledTable
      caption={caption}
      captionHidden
      columns={[
        { key: 'what', head: 'Browser', className: 'min-w-40' },
        { key: 'seen', head: 'Last seen', className: 'whitespace-nowrap' },
        { key: 'since', head: 'Since', className: 'whitespace-nowrap' },
        { key: 'from', head: 'From' },
      ]}
      rows={sessions.map((session) => ({
        key: session.id,
        cells: {
          what: `${deviceWords(session.userAgent)}${session.id === current ? ' (this one)' : ''}`,
          seen: fullTime(session.lastSeenAt, timeZone),
          since: fullTime(session.createdAt, timeZone),
          from: session.address,
        },
      }))}
    />
  );
}
