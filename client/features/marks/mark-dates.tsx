import { Link } from 'react-router-dom';
import type { MarkPage } from '#contract/marks.ts';
import { paths } from '../../lib/paths.ts';
import { dayFrom, saySpan } from '../../lib/say-date.ts';
import { sayFigure } from '../../lib/say-number.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { TimeRule } from '../../ui/time-rule.tsx';
import { sayShare, sayShareAloud } from '../decode/say-share.ts';
import { sayDates } from './mark-words.ts';

type Dates = NonNullable<MarkPage['dates']>;

/** What a mark on record was worked out to mean: its dates with their shares, in a table and on the rule. */
export function MarkDates({ dates }: { readonly dates: Dates }) {
  const { candidates, total, cipher, cipherVersion } = dates;
  return (
    <>
      <p className="mb-4 max-w-measure">
        {sayDates(dates)}
        {cipher !== null && (
          <>
            {' '}
            Read under the <Link to={cipher.slug === null ? paths.factHistory(cipher.id) : paths.cipher(cipher.slug)}>{cipher.title}</Link>
            {cipherVersion !== null && `, version ${cipherVersion}`}.
          </>
        )}
      </p>
      {candidates.length > 0 && (
        <>
          <DataTable
            caption="What the mark can mean"
            rows={candidates}
            rowKey={({ from, to }) => `${from} ${to}`}
            columns={[
              { key: 'date', header: 'It can mean', rowHeader: true, cell: (candidate) => saySpan(candidate) },
              {
                key: 'share',
                header: 'share',
                align: 'end',
                cell: ({ share }) => (
                  <>
                    <span aria-hidden="true">{sayShare(share)}</span>
                    <span className="sr-only">{sayShareAloud(share)}</span>
                  </>
                ),
              },
            ]}
          />
          {total > candidates.length && (
            <p className="mt-2 text-slag">
              {sayFigure(total)} dates in all; the {candidates.length} with the largest shares are listed.
            </p>
          )}
          <div className="mt-6">
            <Rule candidates={candidates} />
          </div>
        </>
      )}
    </>
  );
}

function Rule({ candidates }: Pick<Dates, 'candidates'>) {
  const ticks = candidates.map((candidate) => ({
    key: `${candidate.from} ${candidate.to}`,
    from: dayFrom(candidate.from),
    to: dayFrom(candidate.to),
    share: candidate.share,
    tone: null,
    label: saySpan(candidate),
    note: `share ${sayShare(candidate.share)}`,
  }));
  return <TimeRule title="When it can have been poured" lanes={[{ kind: 'ticks', name: 'poured', ticks }]} focus={ticks.map(({ from, to }) => ({ from, to }))} />;
}
