'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { Checkbox } from '@/components/ui/checkbox';
import { templateKinds } from '@/lib/inspection/checklist-items';
import { templateWords } from '@/lib/inspection/checklist-templates';
import { checkGroupWords } from '@/lib/inspection/holds-work';
import { checkGroups } from '@/lib/inspection/plan';
import type { PlanDraft } from './plan-draft';
import { PlanSelect } from './plan-field';
import { wholeChecklist } from './plan-from-draft';

/** Which checks the pour gets: a template's, less what does not belong here. */
export function ChecklistFields() {
  const { control, setValue } = useFormContext<PlanDraft>();
  const [checklist, elements, template, leftOut] = useWatch({
    control,
    name: ['checklist', 'elements', 'template', 'leftOut'] as const,
  });
  const whole = wholeChecklist({ checklist, elements, template });
  const kept = whole.items.filter((item) => !leftOut.includes(item.id)).length;
  return (
    <div className="grid gap-3">
      {checklist ? (
        <p>
          {checklist.template}, version {checklist.version}: the pour keeps the checks that it was planned
          with.
        </p>
      ) : (
        <PlanSelect
          path="template"
          label="Template"
          placeholder="By the types of the elements"
          options={templateKinds.map((kind) => ({ value: kind, label: templateWords[kind] }))}
          className="max-w-sm"
        />
      )}
      <details>
        <summary className="min-h-6 w-fit font-label font-semibold text-chalk">
          {kept} of {whole.items.length} checks; untick what does not belong here
        </summary>
        <div className="grid gap-x-8 gap-y-3 pt-2 lg:grid-cols-2">
          {checkGroups.map((group) => {
            const items = whole.items.filter((item) => item.group === group);
            if (items.length === 0) return null;
            return (
              <fieldset key={group}>
                <legend className="font-label font-semibold">{checkGroupWords[group]}</legend>
                {items.map((item) => (
                  <Checkbox
                    key={item.id}
                    label={`${item.question}${item.critical ? ' (critical)' : ''}`}
                    checked={!leftOut.includes(item.id)}
                    onChange={(event) =>
                      setValue(
                        'leftOut',
                        event.target.checked ? leftOut.filter((id) => id !== item.id) : [...leftOut, item.id],
                        { shouldDirty: true },
                      )
                    }
                  />
                ))}
              </fieldset>
            );
          })}
        </div>
      </details>
    </div>
  );
}
