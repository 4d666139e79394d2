import { useQuery } from '@tanstack/react-query';
import type { DecodeAnswer, DecodeResult } from '#contract/decode.ts';
import { saySpan, sayYears } from '../../lib/say-date.ts';
import { sayFigure } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { makersToChoose } from './decode-queries.ts';
import { sayShare } from './say-share.ts';
import type { ChangeState } from './use-decode-state.ts';

const DATES_SHOWN = 3;

/** Every cipher that can make the mark, the likeliest first, where no maker was named. */
export function CipherMatches({ answer, change, stale }: { readonly answer: DecodeAnswer; readonly change: ChangeState; readonly stale: boolean }) {
  const makers = useQuery(makersToChoose());
  const rows = answer.results.filter(({ candidates }) => candidates.length > 0);
  const sum = rows.reduce((all, { likelihood }) => all + likelihood, 0);
  if (rows.length === 0) return null;
  const makerOf = (result: DecodeResult) => makers.data?.find(({ id }) => id === result.cipher?.makerId) ?? null;
  return (
    <div className="mt-6">
      <DataTable
        caption="Ciphers that can make this mark"
        rows={rows}
        rowKey={({ cipher }) => cipher?.id ?? 'inline'}
        stale={stale}
        columns={[
          {
            key: 'maker',
            header: 'Maker and cipher',
            rowHeader: true,
            cell: (result) => (
              <>
                {makerOf(result)?.name ?? ''}
                <span className="block text-[15px] font-normal text-slag">
                  {result.cipher?.title}, {sayYears(result.used)}
                </span>
              </>
            ),
          },
          { key: 'dates', header: 'it can mean', cell: sayDates },
          { key: 'likelihood', header: 'likeliness', align: 'end', cell: ({ likelihood }) => sayShare(sum === 0 ? 0 : likelihood / sum) },
          {
            key: 'choose',
            header: 'choose',
            bare: true,
            cell: (result) => {
              const maker = makerOf(result);
              const cipher = result.cipher;
              return maker === null || cipher === null ? null : (
                <Button onClick={() => change({ maker: maker.slug, cipher: cipher.slug })}>
                  Use this one<span className="sr-only">: {cipher.title}</span>
                </Button>
              );
            },
          },
        ]}
      />
    </div>
  );
}

function sayDates({ candidates, total }: DecodeResult): string {
  const said = candidates.slice(0, DATES_SHOWN).map(saySpan);
  const more = total - said.length;
  return more > 0 ? `${said.join(', ')} and ${sayFigure(more)} more` : said.join(', ');
}
