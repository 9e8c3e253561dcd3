import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';

/** Takes the plan of an earlier pour into the form. */
export function CopyFrom({
  pours,
  current,
}: {
  pours: { id: string; label: string }[];
  current: string | null;
}) {
  if (pours.length === 0) return null;
  return (
    <form action="/pours/new" className="flex flex-wrap items-end gap-3">
      <Select
        label="Copy from an earlier pour"
        name="from"
        defaultValue={current ?? ''}
        placeholder="Choose a pour"
        options={pours.map((pour) => ({ value: pour.id, label: pour.label }))}
        fieldClassName="w-full sm:w-80"
      />
      <Button type="submit">Take its plan</Button>
    </form>
  );
}
