import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { parseReading } from '#domain/marks/reading.ts';
import { paths } from '../../lib/paths.ts';
import { sayYears } from '../../lib/say-date.ts';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Live } from '../../ui/live.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { castingsByNumber } from '../decode/decode-queries.ts';

/** The castings a number as typed can be, unreadable glyphs and all. `maker` is the slug of the part's maker, where that is known. */
export function CastingsAnswer({ text, maker }: { readonly text: string; readonly maker: string | null }) {
  const number = parseReading(text).ok ? text : null;
  const { data, error, refetch, isPlaceholderData } = useQuery(castingsByNumber(number, maker));
  if (error !== null) return <FailureNote error={error} onAgain={() => void refetch()} />;
  if (text === '') return <p className="max-w-measure text-slag">The castings the number can be stand here as you type.</p>;
  if (data === undefined) return number === null ? null : <Skeleton lines={3} label="Looking in the catalogue" />;
  const stale = isPlaceholderData || number === null;
  const said = sayFound(data.items.length, data.next !== null);
  return (
    <div className={stale ? 'is-stale-block' : ''}>
      <p className="max-w-measure text-[19px] leading-snug">{said}</p>
      <Live>{stale ? '' : said}</Live>
      <ul className="mt-3">
        {data.items.map(({ id, slug, number: known, pattern, maker: by, partType, made }) => (
          <li key={id} className="border-b border-rule py-2">
            <Link to={paths.casting(slug)} className="inline-flex min-h-11 items-center gap-2">
              <span className="font-mono">{known}</span>
              {pattern !== null && <span>{pattern}</span>}
            </Link>
            <span className="block text-[15px] text-slag">
              {partType.name}, {by.name}
              {made !== null && `, made ${sayYears(made)}`}
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}

function sayFound(shown: number, hasMore: boolean): string {
  if (shown === 0) return 'No casting in the catalogue has such a number. Save it as you see it all the same.';
  if (hasMore) return 'It can be these castings, and others. Each glyph more narrows it.';
  return shown === 1 ? 'It can be one casting in the catalogue.' : 'It can be any of these castings.';
}
