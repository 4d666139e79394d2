import { useEffect, useRef } from 'react';
import type { PartDraft } from './part-draft.ts';
import { changesBetween } from './part-draft.ts';

/** The part was changed since its form was opened: what is different now. What was typed here stays, and saving again puts it on record. */
export function ChangedMeanwhile({ before, now }: { readonly before: PartDraft; readonly now: PartDraft }) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => box.current?.focus(), [now]);
  const changes = changesBetween(before, now);
  return (
    <div ref={box} tabIndex={-1} role="alert" className="mb-6 border-l-4 border-straw bg-bed px-4 py-3">
      <p className="font-semibold">It was changed meanwhile, perhaps in another window</p>
      {changes.length > 0 && (
        <dl className="my-2">
          {changes.map(({ label, now: said }) => (
            <div key={label} className="flex flex-wrap gap-x-3">
              <dt className="text-slag italic">{label}</dt>
              <dd className="wrap-anywhere">now {said}</dd>
            </div>
          ))}
        </dl>
      )}
      <p>{changes.length === 0 ? 'It says the same as when you began.' : 'What you typed is kept below.'} Save again to put yours in its place.</p>
    </div>
  );
}
