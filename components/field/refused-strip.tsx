'use client';

import { ToneGlyph } from '@/components/ui/tone-glyph';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { useSnapshot } from './use-device';

/** Says that the server did not take in what was just kept, and leads to the tray; nothing while it is not so. */
export function RefusedStrip({ entryId }: { entryId: string }) {
  const refused = useSnapshot().refused.find((one) => one.entry.id === entryId);
  if (!refused) return null;
  return (
    <div role="alert" className="border-t border-ink">
      <FieldLink
        href={fieldPaths.notSent}
        className="flex min-h-target items-center gap-2 px-3 py-1.5 text-label leading-tight"
      >
        <ToneGlyph tone="hold" className="shrink-0 text-hold" />
        <span>
          <b className="text-hold">Refused by the server.</b> {refused.sentence}{' '}
          <span className="text-chalk underline underline-offset-4">See what was refused</span>
        </span>
      </FieldLink>
    </div>
  );
}
