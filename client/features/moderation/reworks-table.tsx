import { Link } from 'react-router-dom';
import type { Rework } from '#contract/moderation.ts';
import { paths } from '../../lib/paths.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Icon } from '../../ui/icon.tsx';
import type { IconName } from '../../ui/icon.tsx';
import { TEXT_TONES } from '../../ui/verdict.tsx';
import type { Tone } from '../../ui/verdict.tsx';
import { sayFactKind } from '../sources/say-source.ts';
import { sayOutcome, sayProgress, STATE_WORDS } from './rework-words.ts';

/** What is and was being worked out again, the newest first. */
export function ReworksTable({ rows, stale }: { readonly rows: readonly Rework[] | null; readonly stale: boolean }) {
  return (
    <DataTable
      caption="Worked out again"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'fact',
          header: 'Because of',
          rowHeader: true,
          cell: ({ fact, version }) => (
            <>
              <Link to={paths.factHistory(fact.id)}>{fact.title}</Link>
              <span className="block text-[15px] font-normal text-slag">
                {sayFactKind(fact.kind, 1)}, {version === null ? 'retired' : `version ${version}`}
              </span>
            </>
          ),
        },
        { key: 'state', header: 'state', cell: ({ state }) => <State state={state} /> },
        { key: 'progress', header: 'progress', cell: (rework) => <Progress rework={rework} /> },
        {
          key: 'times',
          header: 'begun',
          cell: ({ startedAt, finishedAt }) => (
            <span className="text-[15px] text-slag">
              {sayInstant(startedAt)}
              {finishedAt !== null && <span className="block">ended {sayInstant(finishedAt)}</span>}
            </span>
          ),
        },
      ]}
    />
  );
}

const LOOKS: Readonly<Record<Rework['state'], { readonly icon: IconName; readonly tone: Tone }>> = {
  waiting: { icon: 'dash', tone: 'slag' },
  running: { icon: 'around', tone: 'straw' },
  done: { icon: 'check', tone: 'verdigris' },
  failed: { icon: 'warning', tone: 'scale' },
};

function State({ state }: Pick<Rework, 'state'>) {
  const { icon, tone } = LOOKS[state];
  return (
    <span className={`inline-flex items-baseline gap-1.5 font-semibold ${TEXT_TONES[tone]}`}>
      <Icon name={icon} /> {STATE_WORDS[state]}
    </span>
  );
}

function Progress({ rework }: { readonly rework: Rework }) {
  const { state, done, total, fact } = rework;
  return (
    <>
      {sayProgress(rework)}
      {state === 'running' && total !== null && (
        <span
          role="progressbar"
          aria-label={`Progress of ${fact.title}`}
          aria-valuemin={0}
          aria-valuemax={total}
          aria-valuenow={done}
          className="mt-2 block h-2 max-w-48 border border-edge"
        >
          <span className="block h-full bg-graphite" style={{ width: `${total === 0 ? 0 : (100 * done) / total}%` }} />
        </span>
      )}
      {state === 'failed' && <span className="block text-[15px] text-slag">a fault stopped it; it is taken up again by itself</span>}
      {state === 'done' && <span className="block text-[15px] text-slag">{sayOutcome(rework)}</span>}
    </>
  );
}
