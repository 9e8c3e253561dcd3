import { Button } from '@/components/ui/button';
import { LinkButton } from '@/components/ui/link-button';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { pourStateWords } from '@/lib/inspection/pour-state';
import { roleWords, roles } from '@/lib/inspection/roles';
import type { PoursQuery } from './pours-query';

const optionsOf = (words: Record<string, string>) =>
  Object.entries(words).map(([value, label]) => ({ value, label }));

/** What to show of the list; a plain form, so that it works as soon as the page is there. */
export function PoursFilters({ query }: { query: PoursQuery }) {
  const filtered = Boolean(query.state || query.text || query.clears);
  return (
    <form action="/pours" role="search" aria-label="Pours" className="flex flex-wrap items-end gap-3">
      {query.sort !== 'planned' && <input type="hidden" name="sort" value={query.sort} />}
      {query.order === 'down' && <input type="hidden" name="order" value="down" />}
      <TextInput
        label="Number, title or place"
        name="text"
        type="search"
        defaultValue={query.text}
        fieldClassName="w-full sm:w-56"
      />
      <Select
        label="State"
        name="state"
        defaultValue={query.state ?? ''}
        placeholder="Any"
        options={optionsOf(pourStateWords)}
        fieldClassName="w-40 grow sm:grow-0"
      />
      <Select
        label="Holds cleared by"
        name="clears"
        defaultValue={query.clears ?? ''}
        placeholder="Anybody"
        options={roles
          .filter((role) => role !== 'viewer')
          .map((role) => ({ value: role, label: roleWords[role] }))}
        fieldClassName="w-44 grow sm:grow-0"
      />
      <Button type="submit">Show</Button>
      {filtered && (
        <LinkButton href="/pours" variant="quiet">
          Show all
        </LinkButton>
      )}
    </form>
  );
}
