'use client';

import { ToneGlyph } from '@/components/ui/tone-glyph';
import { roleWords } from '@/lib/inspection/roles';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { holdPath } from './hold-path';
import type { OpenSheet } from './open-sheet';

const MOST = 4;

/** The first holds that this person's role clears, each one tap from what clears it. */
export function LeftForYou({ open }: { open: OpenSheet }) {
  const { holds, sheet, project } = open;
  const own = holds.filter((hold) => hold.clearedBy === project.role);
  const others = holds.length - own.length;
  return (
    <div>
      <div className="flex items-baseline justify-between gap-3 px-3 pt-1 pb-1">
        <h2 className="text-heading">Left for you</h2>
        <span className="font-label text-label font-medium text-pencil">
          as {roleWords[project.role].toLowerCase()}
        </span>
      </div>
      {own.length === 0 ? (
        <p className="flex items-center gap-2 px-3 pb-3 text-pencil">
          <ToneGlyph tone="met" className="text-met" />
          {holds.length === 0 ? 'No hold stands.' : 'Nothing. Others have holds to clear.'}
        </p>
      ) : (
        <ul className="border-t border-rule">
          {own.slice(0, MOST).map((hold) => (
            <li key={hold.id} className="border-b border-rule">
              <FieldLink
                href={holdPath(hold, sheet)}
                className="block min-h-target px-3 py-2 hover:bg-paper/60"
              >
                <span className="block font-label font-semibold">{hold.title}</span>
                <span className="block text-label text-pencil">{hold.where}</span>
              </FieldLink>
            </li>
          ))}
        </ul>
      )}
      {holds.length > 0 && (
        <FieldLink
          href={fieldPaths.holds(sheet.pourId)}
          className="flex min-h-target items-center px-3 font-label font-semibold text-chalk underline underline-offset-4"
        >
          {own.length > MOST
            ? `All ${holds.length} holds`
            : others > 0
              ? `All ${holds.length} holds, ${others} with others`
              : 'See the holds'}
        </FieldLink>
      )}
    </div>
  );
}
