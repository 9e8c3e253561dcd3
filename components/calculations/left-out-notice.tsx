import { Notice } from '@/components/ui/notice';
import type { OpenedLink } from './link';

/** What a link asked for and did not get. */
export function LeftOutNotice({ leftOut, assumed }: Pick<OpenedLink, 'leftOut' | 'assumed'>) {
  if (leftOut.length === 0 && assumed.length === 0) return null;
  return (
    <Notice tone="watch" role="note" title="This link is not all that the calculation needs">
      {leftOut.length > 0 && (
        <ul>
          {leftOut.map(({ label, text, problem }, index) => (
            <li key={index}>
              <b>{label}</b> “{text}”: {problem}
            </li>
          ))}
        </ul>
      )}
      {assumed.length > 0 && <p>Not said by the link, so as in the example: {assumed.join(', ')}.</p>}
      <p>Look at these inputs. The rest is as the link says.</p>
    </Notice>
  );
}
