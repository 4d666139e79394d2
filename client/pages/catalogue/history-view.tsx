import { Link } from 'react-router-dom';
import type { HistoryEntry } from '#contract/common.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { capital } from '../../lib/say-number.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Icon } from '../../ui/icon.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { payloadDifference, payloadLines } from './payload-difference.ts';

type Props = {
  /** What the versions are of, and where it stands. */
  readonly name: string;
  readonly path: string;
  /** Newest first. */
  readonly versions: readonly HistoryEntry[];
};

/** The versions of a fact, newest first, each with what it changed. */
export function HistoryView({ name, path, versions }: Props) {
  return (
    <>
      <PageTitle
        title={`History of ${name}`}
        above={<Link to={path}>{name}</Link>}
        below="Nothing is overwritten: every version stays, newest first."
      >
        What changed
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          {versions.map((entry, place) => (
            <VersionBlock key={entry.version} entry={entry} before={versions[place + 1] ?? null} />
          ))}
        </PageGrid>
      </div>
    </>
  );
}

function VersionBlock({ entry, before }: { readonly entry: HistoryEntry; readonly before: HistoryEntry | null }) {
  const { version, enteredBy, enteredAt, reason, inForce, payload } = entry;
  return (
    <Block
      heading={`Version ${version}`}
      notes={[{ number: null, heading: enteredBy, body: `entered it on ${sayMoment(enteredAt)}.` }]}
    >
      {inForce && (
        <p className="mb-2 flex items-center gap-1.5 font-semibold text-verdigris">
          <Icon name="check" /> In force
        </p>
      )}
      <p className="mb-3 max-w-measure">{reason}</p>
      {before !== null && (
        <DataTable
          caption={`What version ${version} changed`}
          rows={payloadDifference(before.payload, payload)}
          rowKey={({ path }) => path}
          empty={<p className="text-slag">The same facts as version {before.version}, entered again.</p>}
          columns={[
            { key: 'field', header: 'Field', rowHeader: true, cell: ({ field }) => capital(field) },
            { key: 'before', header: 'before', cell: ({ before: was }) => was ?? <Nothing /> },
            { key: 'after', header: 'since', cell: ({ after }) => after ?? <Nothing /> },
          ]}
        />
      )}
      <details className="mt-2" open={before === null}>
        <summary className="inline-flex min-h-11 cursor-pointer items-center text-[15px] text-slag underline underline-offset-4">
          The whole entry as version {version} had it
        </summary>
        <DataTable
          caption={`Version ${version}, whole`}
          rows={payloadLines(payload)}
          rowKey={({ path }) => path}
          columns={[
            { key: 'field', header: 'Field', rowHeader: true, cell: ({ field }) => capital(field) },
            { key: 'value', header: 'says', cell: ({ value }) => value },
          ]}
        />
      </details>
    </Block>
  );
}

function Nothing() {
  return <span className="text-slag italic">nothing</span>;
}
