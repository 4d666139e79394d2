import type { ReadingInForce } from '#contract/marks.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Icon } from '../../ui/icon.tsx';
import { isDisputed, sayAgreement, sayGlyphText } from './agreement-words.ts';
import { MarkText } from './mark-text.tsx';

type Place = ReadingInForce['places'][number] & { readonly key: string };

/** How the reading in force was worked out: who reads all of it so, and glyph by glyph who read what. */
export function InForcePart({ inForce }: { readonly inForce: ReadingInForce }) {
  const { whole, places } = inForce;
  const disputed = places.filter(isDisputed).length;
  const rows = places.map((place, at): Place => ({ ...place, key: String(at) }));
  return (
    <>
      <p className="max-w-measure">{sayAgreement(whole, 'all of it so')}.</p>
      <p className="mt-1 mb-4 max-w-measure text-slag">
        {whole.readers === 1
          ? 'It stands as this one reads it, until others have read it too.'
          : disputed === 0
            ? 'Every glyph is read alike by all who read it.'
            : disputed === 1
              ? 'At one place they differ.'
              : `At ${disputed} places they differ.`}
      </p>
      {disputed > 0 ? <Places rows={rows} /> : <Folded rows={rows} />}
    </>
  );
}

/** Where all agree, the table has nothing to point at; it is there for who wants to check. */
function Folded({ rows }: { readonly rows: readonly Place[] }) {
  return (
    <details>
      <summary className="inline-flex min-h-11 cursor-pointer items-center text-temper underline underline-offset-3">Glyph by glyph</summary>
      <Places rows={rows} />
    </details>
  );
}

function Places({ rows }: { readonly rows: readonly Place[] }) {
  return (
    <DataTable
      caption="Glyph by glyph"
      rows={rows}
      rowKey={({ key }) => key}
      columns={[
        {
          key: 'glyph',
          header: 'Glyph',
          rowHeader: true,
          cell: (place) => (
            <span className="flex flex-wrap items-center gap-x-3 gap-y-1">
              {place.settled === '' ? <span className="font-normal text-slag">nothing stands here</span> : <MarkText text={place.settled} />}
              {isDisputed(place) && (
                <span className="inline-flex items-center gap-1.5 text-[15px] text-straw">
                  <Icon name="warning" /> they differ
                </span>
              )}
            </span>
          ),
        },
        { key: 'agree', header: 'agreement', bare: true, cell: (place) => sayAgreement(place, sayGlyphText(place.settled)) },
        { key: 'said', header: 'read by', cell: ({ said }) => <Said said={said} /> },
      ]}
    />
  );
}

function Said({ said }: Pick<Place, 'said'>) {
  return (
    <ul>
      {said.map(({ text, by }) => (
        <li key={text}>
          <span className={text.length === 1 && text !== '?' && text !== '*' ? 'font-mono font-bold' : 'italic'}>{sayGlyphText(text)}</span>: {by.join(', ')}
        </li>
      ))}
    </ul>
  );
}
