import type { ReactNode } from 'react';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { ContributionPage } from '#contract/contributions.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import type { DraftStore } from './draft-store.ts';
import type { Draft } from './draft-values.ts';
import type { Names } from './payload-list.tsx';
import { SideBySide } from './side-by-side.tsx';

/** Something about the draft that must be settled before it can go on. */
function Panel({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <section aria-label={title} className="mb-8 border-l-4 border-straw bg-bed px-4 py-3">
      <h2 className="mb-1 font-semibold">{title}</h2>
      {children}
    </section>
  );
}

type ConflictProps = { readonly theirs: ContributionPage; readonly draft: Draft; readonly names: Names; readonly store: DraftStore };

/** The same draft was saved elsewhere meanwhile: both, and the choice between them. */
export function ConflictPanel({ theirs, draft, names, store }: ConflictProps) {
  return (
    <Panel title="It was saved elsewhere too">
      <p role="alert" className="mb-3 max-w-measure">
        In another window or on another device this draft was changed since you began here. What you typed here is kept on this device.
      </p>
      <SideBySide
        kind={theirs.kind}
        caption="Here and as saved elsewhere"
        names={[...names, ...theirs.names]}
        sides={[
          { header: 'here', payload: draft.payload },
          { header: 'saved elsewhere', payload: theirs.payload },
        ]}
      />
      <div className="mt-3 flex flex-wrap gap-3">
        {theirs.can.edit ? <Button onClick={() => store.settle('ours')}>Go on with what is here</Button> : <p>It can’t be changed any more where it stands now.</p>}
        <Button onClick={() => store.settle('theirs')}>Take what was saved elsewhere</Button>
      </div>
    </Panel>
  );
}

type MovedOnProps = { readonly contribution: ContributionPage; readonly draft: Draft; readonly store: DraftStore };

/** Whether the fact has another version in force than the one the contribution was begun on. */
export function hasMovedOn({ base, inForce }: Pick<ContributionPage, 'base' | 'inForce'>): boolean {
  return base !== null && base.version !== inForce?.version;
}

/** The fact moved on since the draft was begun: three accounts of it, and carrying the draft over. */
export function MovedOnPanel({ contribution, draft, store }: MovedOnProps) {
  const { kind, base, inForce, names, subject } = contribution;
  const [busy, setBusy] = useState(false);
  if (base === null || !hasMovedOn(contribution)) return null;
  if (inForce === null) {
    return (
      <Panel title="The entry was retired meanwhile">
        <p className="max-w-measure">
          Nothing is in force of it any more, so there is nothing to change.
          {subject !== null && (
            <>
              {' '}
              <Link to={paths.factHistory(subject.id)}>See why</Link>.
            </>
          )}
        </p>
      </Panel>
    );
  }
  const takeTheirs = (key: string): void => store.change((now) => ({ ...now, payload: { ...now.payload, [key]: inForce.payload[key] ?? null } }));
  return (
    <Panel title={`Version ${inForce.version} was entered meanwhile`}>
      <p className="mb-3 max-w-measure">
        You began on version {base.version}. Look at both, take over what you agree with, and carry your own over to the version that is in force now.
      </p>
      <SideBySide
        kind={kind}
        caption="Both versions and yours"
        names={names}
        sides={[
          { header: `version ${base.version}`, payload: base.payload },
          { header: `version ${inForce.version}, in force`, payload: inForce.payload },
          { header: 'yours', payload: draft.payload },
        ]}
        deed={{
          header: '',
          cell: ({ key, label }) => (
            <button type="button" className="min-h-11 cursor-pointer text-[15px] text-temper underline" onClick={() => takeTheirs(key)}>
              Take version {inForce.version}’s<span className="sr-only"> for {label.toLowerCase()}</span>
            </button>
          ),
        }}
      />
      <Button
        className="mt-3"
        disabled={busy}
        onClick={() => {
          setBusy(true);
          void store.carryOver(inForce.version).finally(() => setBusy(false));
        }}
      >
        Carry mine over to version {inForce.version}
      </Button>
    </Panel>
  );
}
