import type { CipherDefinition, FieldDefinition } from '#domain/ciphers/definition.ts';
import { capital } from '../../lib/say-number.ts';
import { fieldRemarks, sayField, sayWidth, widthOf } from './cipher-words.ts';

/** The cipher as it stands on the iron: a place for each glyph, dashed where it may be missing, its field below. */
export function CipherLayout({ definition: { fields, symbolSets } }: { readonly definition: CipherDefinition }) {
  return (
    <ol className="flex flex-wrap gap-x-6 gap-y-6">
      {fields.map((field, place) => (
        <li key={place} className="min-w-28 flex-1 basis-36">
          <FieldPlaces field={field} />
          <p className="mt-2 border-t border-graphite pt-1 font-semibold">{capital(sayField(field))}</p>
          <p className="text-[15px] leading-snug text-slag">
            {[sayWidth(field), sayScript(field), ...fieldRemarks(field, symbolSets)].filter((part) => part !== '').join('; ')}
          </p>
        </li>
      ))}
    </ol>
  );
}

const PLACE = 'grid h-12 w-9 place-items-center rounded border border-edge bg-paper font-mono text-[22px] font-bold';

/** A place for each glyph a field may take, dashed where it may be missing. */
export function FieldPlaces({ field }: { readonly field: FieldDefinition }) {
  const { least, most } = widthOf(field);
  const text = field.field === 'literal' ? [...field.text] : [];
  return (
    <div aria-hidden="true" className="flex gap-1">
      {Array.from({ length: Math.max(most, text.length) }, (_, place) => (
        <span
          key={place}
          className={`${PLACE} ${place < least ? '' : 'border-dashed'}`}
        >
          {text[place] ?? ''}
        </span>
      ))}
    </div>
  );
}

/** What it is written in. */
function sayScript(field: FieldDefinition): string {
  if (field.field === 'literal') return '';
  return field.symbols === 'numerals' ? 'in figures' : `in the symbols of “${field.symbols}”`;
}
