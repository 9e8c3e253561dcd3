'use client';

import { Notice } from '@/components/ui/notice';
import type { Problems } from './problems-of';

/** What is wrong with a form as a whole: problems that belong to none of the fields shown. */
export function FormProblem({ problems, shown }: { problems: Problems; shown: readonly string[] }) {
  const rest = Object.entries(problems).filter(([path]) => !shown.includes(path));
  if (rest.length === 0) return null;
  return (
    <Notice tone="hold" title="Not kept yet">
      {rest.map(([path, message]) => (
        <p key={path}>{message}</p>
      ))}
      <p>What you entered is still here.</p>
    </Notice>
  );
}
