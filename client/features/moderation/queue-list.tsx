import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { FactRef, Person } from '#contract/contributions.ts';
import type { QueueItem } from '#contract/moderation.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { Icon } from '../../ui/icon.tsx';
import { SkeletonBar } from '../../ui/skeleton.tsx';
import { pathOfRef } from '../contributions/path-of-ref.ts';
import { InlineStep } from '../people/inline-step.tsx';
import { sayFactKind } from '../sources/say-source.ts';
import { sayOpenWith, sayWait } from './queue-words.ts';
import { SettleForm } from './settle-form.tsx';

const SKELETONS = [1, 2, 3, 4] as const;

type Props = {
  readonly rows: readonly QueueItem[] | null;
  readonly stale: boolean;
  /** Registrars see the queue and decide nothing in it. */
  readonly mayDecide: boolean;
};

/** What waits, the oldest first: contributions to decide and flags to settle. */
export function QueueList({ rows, stale, mayDecide }: Props) {
  const [now] = useState(() => Date.now());
  if (rows === null) {
    return (
      <ul aria-busy="true" aria-label="The queue" className="border-t border-graphite">
        {SKELETONS.map((row) => (
          <li key={row} className="space-y-2 border-b border-rule py-4">
            <SkeletonBar width="w-56" />
            <SkeletonBar width="w-80" />
          </li>
        ))}
      </ul>
    );
  }
  return (
    <ol aria-label="The queue" aria-busy={stale} className={`border-t border-graphite ${stale ? 'is-stale-block' : ''}`}>
      {rows.map((item) => (
        <li key={item.id} className="border-b border-rule py-4">
          {item.type === 'contribution' ? <Waiting item={item} now={now} /> : <Flagged item={item} now={now} mayDecide={mayDecide} />}
        </li>
      ))}
    </ol>
  );
}

function Waiting({ item, now }: { readonly item: Extract<QueueItem, { readonly type: 'contribution' }>; readonly now: number }) {
  const { contribution, openWith, own } = item;
  const { id, kind, title, subject, maker, author } = contribution;
  return (
    <div className="grid gap-x-6 gap-y-1 roomy:grid-cols-[minmax(0,1fr)_168px]">
      <div className="min-w-0">
        <p>
          <Link to={paths.contribution(id)} className="inline-block py-1 font-semibold wrap-anywhere">
            {title}
          </Link>
        </p>
        <p className="text-slag">
          {subject === null ? `A new ${sayFactKind(kind, 1).toLowerCase()}` : `A change to a ${sayFactKind(kind, 1).toLowerCase()}`}
          {maker !== null && `, ${maker.name}`}, by <Author person={author} />
        </p>
        {own && (
          <p className="flex items-center gap-1.5 text-[15px] text-slag">
            <Icon name="dash" /> Your own: another moderator decides it
          </p>
        )}
        {openWith.length > 0 && (
          <p className="flex items-center gap-1.5 text-[15px] font-semibold text-straw">
            <Icon name="around" /> {sayOpenWith(openWith)}
          </p>
        )}
      </div>
      <Since at={item.at} now={now} />
    </div>
  );
}

function Flagged({ item, now, mayDecide }: { readonly item: Extract<QueueItem, { readonly type: 'flag' }>; readonly now: number; readonly mayDecide: boolean }) {
  const { fact, by, reason, id } = item.flag;
  return (
    <div className="grid gap-x-6 gap-y-1 roomy:grid-cols-[minmax(0,1fr)_168px]">
      <div className="min-w-0">
        <p className="flex flex-wrap items-center gap-x-2">
          <span className="inline-flex items-center gap-1.5 font-semibold text-scale">
            <Icon name="warning" /> Flagged
          </span>
          <FactLink fact={fact} />
        </p>
        <p className="max-w-measure whitespace-pre-line wrap-anywhere">“{reason}”</p>
        <p className="text-slag">
          {sayFactKind(fact.kind, 1)}, flagged by <Author person={by} />
        </p>
        {mayDecide && (
          <div className="mt-2">
            <InlineStep label="Settle">{(close) => <SettleForm flagId={id} onDone={close} />}</InlineStep>
          </div>
        )}
      </div>
      <Since at={item.at} now={now} />
    </div>
  );
}

function FactLink({ fact }: { readonly fact: FactRef }) {
  return (
    <Link to={pathOfRef(fact)} className="inline-block py-1 font-semibold wrap-anywhere">
      {fact.title}
    </Link>
  );
}

function Author({ person: { id, displayName } }: { readonly person: Person }) {
  return <Link to={paths.contributor(id)}>{displayName}</Link>;
}

function Since({ at, now }: { readonly at: string; readonly now: number }) {
  return (
    <p className="text-[15px] text-slag roomy:text-right">
      <span className="sr-only">Waiting </span>
      {sayWait(at, now)}
      <time dateTime={at} className="block">
        since {sayMoment(at)}
      </time>
    </p>
  );
}
