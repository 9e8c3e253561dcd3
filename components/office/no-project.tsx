import { EmptyState } from '@/components/ui/empty-state';
import { PageMain } from './page-main';

/** A person who is in no project sees that, and who can change it. */
export function NoProject() {
  return (
    <PageMain narrow>
      <h1 className="text-title">Pours</h1>
      <EmptyState title="You are not in a project yet">
        A coordinator of the project adds you with the role that you hold there.
      </EmptyState>
    </PageMain>
  );
}
