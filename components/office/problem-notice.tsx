import { Notice } from '@/components/ui/notice';
import type { Posted } from './post-json';

/** Why something was not carried out, what was kept, and the incident's number where there is one. */
export function ProblemNotice({
  failure,
  title = 'Not recorded',
}: {
  failure: Extract<Posted, { ok: false }>;
  title?: string;
}) {
  return (
    <Notice tone="hold" title={title}>
      <p>{failure.sentence}</p>
      {failure.code === 'sign-in-needed' && (
        <p>
          <a className="text-chalk underline" href="/sign-in" target="_blank" rel="noreferrer">
            Sign in in another tab
          </a>{' '}
          and send this again.
        </p>
      )}
      {failure.incident && <p className="text-pencil">Incident {failure.incident}</p>}
    </Notice>
  );
}
