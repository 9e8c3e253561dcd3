'use client';

import { useState } from 'react';
import { fieldPaths } from './field-routes';
import type { OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { SignForm } from './sign-form';
import { SignatureStanding } from './signature-standing';
import { signatureFigures } from './signature-words';

/** What is signed, in words and figures; the signatures and how they stand; yours. */
export function SignScreen({ open }: { open: OpenSheet }) {
  const { sheet, pour, project, person } = open;
  const { role } = project;
  const as = role === 'inspector' || role === 'superintendent' ? role : null;
  const [elementIds, setElementIds] = useState<string[] | null>(null);
  const own = sheet.signatures.filter(
    (state) => state.entry.authorId === person.id && state.setAsideBy === null,
  );
  const covered = sheet.plan.elements.every((element) =>
    own.some(({ entry }) => entry.body.elementIds === null || entry.body.elementIds.includes(element.id)),
  );
  return (
    <Screen
      title="Sign"
      aside={pour.number}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
      form
    >
      <div className="grid gap-5 md:grid-cols-2 md:items-start">
        <div className="grid gap-5">
          <section className="border border-ink bg-sheet p-3">
            <h2 className="mb-1 text-heading">What the sheet says now</h2>
            <dl>
              {signatureFigures(sheet, elementIds).map(({ label, value }) => (
                <div
                  key={label}
                  className="grid grid-cols-[9rem_1fr] gap-2 border-b border-rule py-1.5 last:border-b-0"
                >
                  <dt className="font-label font-semibold text-pencil">{label}</dt>
                  <dd>{value}</dd>
                </div>
              ))}
            </dl>
          </section>
          <SignatureStanding open={open} />
        </div>
        {as && !covered && (
          <SignForm open={open} as={as} elementIds={elementIds} onElements={setElementIds} />
        )}
        {!as && (
          <p className="px-1 text-pencil">
            The inspector and the superintendent sign: two people. The engineer decides nonconformances in the
            office.
          </p>
        )}
      </div>
    </Screen>
  );
}
