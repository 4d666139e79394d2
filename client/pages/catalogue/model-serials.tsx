import { Link } from 'react-router-dom';
import { accountsOf, saySeries, serialRows } from '../../features/models/serial-rows.ts';
import type { Account, ModelRange, ModelSeries, SerialRow } from '../../features/models/serial-rows.ts';
import { RowActions } from '../../features/contributions/fact-actions.tsx';
import { RivalAccounts } from '../../features/moderation/rival-accounts.tsx';
import { sayRangeDates, sayRangeStanding } from '../../features/serial-ranges/say-range.ts';
import { paths } from '../../lib/paths.ts';
import { saySpan } from '../../lib/say-date.ts';
import { saySerial, saySerials } from '../../lib/say-serials.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/data-table.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';

type Numbers = (key: string) => readonly number[];

/** Key of a fact of the serial table among the page's notes. */
export const serialFact = {
  range: ({ id }: Pick<ModelRange, 'id'>) => `range ${id}`,
  anchor: ({ id }: Pick<ModelSeries, 'id'>, number: string) => `anchor ${id} ${number}`,
};

/** One series: its numbers with what each account says of them side by side, gaps and open end shown, then its dated machines. */
export function ModelSerials({ series, numbersOf }: { readonly series: ModelSeries; readonly numbersOf: Numbers }) {
  const accounts = accountsOf(series);
  return (
    <>
      {accounts.length > 1 && <RivalAccounts {...{ series, accounts }} />}
      <DataTable
        caption={`Numbers of ${saySeries(series)}`}
        rows={serialRows(series.ranges)}
        rowKey={({ first }) => first}
        columns={[
          numbersColumn(series),
          ...accounts.map((account, place) => accountColumn(account, accounts.length === 1 ? null : place, series, numbersOf)),
        ]}
        empty={<p className="border-y border-rule py-4 text-slag">No range of this series is on record.</p>}
      />
      {series.anchors.length > 0 && <DatedMachines {...{ series, numbersOf }} />}
    </>
  );
}

function numbersColumn({ prefix }: ModelSeries): Column<SerialRow> {
  return {
    key: 'numbers',
    header: 'Numbers',
    rowHeader: true,
    cell: ({ first, last }) => (
      <span className="font-mono text-[15px] whitespace-nowrap">{saySerials({ prefix, first, last })}</span>
    ),
  };
}

/** `place` among several accounts, counted from 0; null where there is one only. The rule calls them by the same numbers. */
function accountColumn(account: Account, place: number | null, { prefix }: ModelSeries, numbersOf: Numbers): Column<SerialRow> {
  const header =
    place === null ? account.title : `${account.title} (${account.preferred ? 'the register’s reading' : `account ${place + 1}`})`;
  return {
    key: account.id,
    header,
    bare: true,
    cell: (row) => {
      const range = row.ranges.get(account.id);
      if (range === undefined) return <Silence isGap={row.ranges.size === 0} isFirst={place === null || place === 0} />;
      return (
        <>
          {place !== null && (
            <span aria-hidden="true" className="block text-[15px] text-slag italic roomy:hidden">
              {header}
            </span>
          )}
          <RangeCell {...{ range, row, prefix }} notes={numbersOf(serialFact.range(range))} />
        </>
      );
    },
  };
}

/** Where an account has no range: a gap is said once, and on a phone only those accounts are named that say something. */
function Silence({ isGap, isFirst }: { readonly isGap: boolean; readonly isFirst: boolean }) {
  if (isGap) return isFirst ? <span className="text-slag">a gap: nothing on record</span> : null;
  return <span className="hidden text-slag roomy:inline">says nothing</span>;
}

function RangeCell({
  range,
  row,
  prefix,
  notes,
}: {
  readonly range: ModelRange;
  readonly row: SerialRow;
  readonly prefix: string;
  readonly notes: readonly number[];
}) {
  const isWhole = range.first === row.first && range.last === row.last;
  const remarks = [
    ...(isWhole ? [] : [`of ${saySerials({ prefix, first: range.first, last: range.last })}`]),
    ...(range.standing === 'solid' ? [] : [sayRangeStanding(range.standing)]),
    ...(range.inOrder ? ['issued in order'] : []),
    ...(range.last === null ? ['last number not known'] : []),
  ];
  return (
    <>
      <Link to={paths.serialRange(range.slug)}>{sayRangeDates(range)}</Link>
      <NoteRef numbers={notes} />
      {remarks.length > 0 && <span className="block text-[15px] leading-snug text-slag">{remarks.join(', ')}</span>}
    </>
  );
}

function DatedMachines({ series, numbersOf }: { readonly series: ModelSeries; readonly numbersOf: Numbers }) {
  return (
    <div className="mt-6">
      <DataTable
        caption="Machines dated by other means"
        captionShown
        rows={series.anchors}
        rowKey={({ number }) => number}
        columns={[
          {
            key: 'number',
            header: 'Serial',
            rowHeader: true,
            cell: ({ id, number }) => (
              <>
                <span className="font-mono text-[15px]">{saySerial(series.prefix, number)}</span>
                <RowActions factId={id} name={saySerial(series.prefix, number)} />
              </>
            ),
          },
          {
            key: 'built',
            header: 'built',
            cell: ({ number, built }) => (
              <>
                {saySpan(built)}
                <NoteRef numbers={numbersOf(serialFact.anchor(series, number))} />
              </>
            ),
          },
        ]}
      />
    </div>
  );
}
