'use client';

import { FaceMap } from '@/components/drawings/face-map';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import type { LengthUnit } from '@/lib/concrete/length';
import type { FixItem } from '@/lib/inspection/fix-list-item';
import { onTape } from './face-drawings';
import { FieldLink } from './field-router';
import { fixItemWords, fixListWords, type FixLanguage } from './fix-list-words';
import { PhotoImage } from './photo-image';
import { usePhotoAddress } from './use-photo-address';

/** One thing to put right: what it is, where on the face, its photos, and the way to report it. */
export function FixLine({
  item,
  number,
  language,
  units,
  reported,
  reportPath,
}: {
  item: FixItem;
  number: number;
  language: FixLanguage;
  units: LengthUnit;
  /** It was reported on this device, and the list does not say so yet. */
  reported: boolean;
  /** Null where this person does not report corrections. */
  reportPath: string | null;
}) {
  const words = fixListWords[language];
  const { title, lines } = fixItemWords(item, language);
  return (
    <li className="break-inside-avoid border-b border-rule last:border-b-0">
      {/* On a tablet the place on the face stands beside the words. */}
      <div className={item.face ? 'md:grid md:grid-cols-2' : undefined}>
        <div className="grid grid-cols-[2rem_1fr] content-start px-3 py-2.5">
          <span className="font-figure text-lead font-medium">{number}</span>
          <div className="min-w-0">
            <h2 className="text-lead">{title}</h2>
            <p className="text-label text-pencil">{item.where}</p>
            {lines.map((line) => (
              <p key={line} className="font-figure text-label font-medium">
                {line}
              </p>
            ))}
          </div>
        </div>
        {item.face && <OnFace face={item.face} language={language} units={units} />}
      </div>
      {item.photoIds.length > 0 && (
        <ul className="grid grid-cols-2 gap-2 px-3 pb-3 sm:grid-cols-3">
          {item.photoIds.map((photoId, index) => (
            <FixPhoto
              key={photoId}
              photoId={photoId}
              words={`${words.photo} ${index + 1}`}
              notHere={words.photoNotHere}
            />
          ))}
        </ul>
      )}
      {reported && (
        <p className="flex items-center gap-2 border-t border-rule px-3 py-3 font-label font-semibold text-watch">
          <ToneGlyph tone="watch" className="shrink-0" />
          {words.waitsToBeSent}
        </p>
      )}
      {reportPath && !reported && (
        <FieldLink
          href={reportPath}
          className="flex min-h-target items-center justify-end border-t border-rule px-3 font-label font-semibold text-chalk underline underline-offset-4 print:hidden"
        >
          {words.report}
        </FieldLink>
      )}
    </li>
  );
}

function OnFace({
  face,
  language,
  units,
}: {
  face: NonNullable<FixItem['face']>;
  language: FixLanguage;
  units: LengthUnit;
}) {
  const format = (mm: number) => onTape(mm, units);
  return (
    <div className="px-1 pb-2">
      <FaceMap
        name={face.name}
        widthMm={face.widthMm}
        heightMm={face.heightMm}
        openings={face.openings}
        recesses={face.recesses}
        points={face.points.map(({ key, ...point }) => ({ ...point, id: key }))}
        format={format}
        maxHeightRem={14}
      />
      <ul className="px-2">
        {face.points.map((point) => (
          <li key={point.key} className="text-label text-pencil">
            <span className="font-semibold text-ink">{point.label}</span>:{' '}
            {fixListWords[language].fromLeftAndUp(
              `${format(point.xMm)} ${units}`,
              `${format(point.yMm)} ${units}`,
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}

function FixPhoto({ photoId, words, notHere }: { photoId: string; words: string; notHere: string }) {
  const address = usePhotoAddress(photoId);
  return (
    <li className="border border-ink bg-paper">
      {address ? (
        <PhotoImage src={address} alt={words} className="aspect-4/3 w-full object-cover" />
      ) : (
        <span className="grid aspect-4/3 place-items-center px-2 text-center text-label text-pencil">
          {notHere}
        </span>
      )}
    </li>
  );
}
