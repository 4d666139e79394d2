import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { AUDIT_ACTS, listAudit } from '#contract/admin.ts';
import type { AuditRow } from '#contract/admin.ts';
import { ACT_WORDS } from '../../features/registrar/audit-words.ts';
import { AuditTable } from '../../features/registrar/audit-table.tsx';
import { dayShown, endOfDay, startOfDay } from '../../features/registrar/day-bounds.ts';
import { RegistrarLinks } from '../../features/registrar/registrar-links.tsx';
import { RegistrarOnly } from '../../features/registrar/registrar-only.tsx';
import { auditList, memberPage } from '../../features/registrar/registrar-queries.ts';
import { pathOfSubject } from '../../features/registrar/subject-path.ts';
import { paths } from '../../lib/paths.ts';
import { TextField } from '../../ui/text-field.tsx';
import { ChoiceFilter, OrderFilter, TextFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { changeSearch } from '../catalogue/list-search.ts';
import { useListSearch } from '../catalogue/use-list-search.ts';

const ORDERS = [
  { value: '-at', text: 'time, newest first' },
  { value: 'at', text: 'time, oldest first' },
] as const;
const ACT_CHOICES = AUDIT_ACTS.map((act) => ({ value: act, text: ACT_WORDS[act] }));

export function Component() {
  return (
    <RegistrarOnly can="seeAudit">
      <Audit />
    </RegistrarOnly>
  );
}

function Audit() {
  const { query, refused, params, narrowed, change } = useListSearch(listAudit.query);
  const state = useQuery(auditList(query));
  const searchWith = (part: 'actor' | 'subject', id: string | null) => `?${changeSearch(params, { [part]: id }).toString()}`;
  return (
    <ListPage<AuditRow>
      title="Audit trail"
      noun={['act', 'acts']}
      above={<RegistrarLinks />}
      below="Who did what, to whom or to what, and when. Nobody can change or remove a row."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Name or request" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <ChoiceFilter label="Act" value={query.act} choices={ACT_CHOICES} all="any act" onChange={(act) => change({ act })} />
          <DayFilter label="From day" value={dayShown(query.since, 'since')} error={refused['since']} onChange={(day) => change({ since: day === null ? null : startOfDay(day) })} />
          <DayFilter label="To day" value={dayShown(query.until, 'until')} error={refused['until']} onChange={(day) => change({ until: day === null ? null : endOfDay(day) })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
          {query.actor !== undefined && <Narrowed id={query.actor} said="Done by" without={searchWith('actor', null)} />}
          {query.subject !== undefined && (
            <NarrowedTo
              subject={state.data?.items.find(({ subject }) => subject?.id === query.subject)?.subject ?? null}
              id={query.subject}
              without={searchWith('subject', null)}
            />
          )}
        </>
      }
      aside={<p>Days and times are those of UTC. A name in a row narrows the trail to it.</p>}
      table={(rows, stale) => <AuditTable {...{ rows, stale }} narrow={searchWith} />}
      advice="Take one filter away, or widen the days."
      empty="Every act will stand here once there is one."
    />
  );
}

type DayFilterProps = {
  readonly label: string;
  readonly value: string;
  readonly error: string | undefined;
  /** A whole day, or null once the box is empty. */
  readonly onChange: (day: string | null) => void;
};

function DayFilter({ label, value, error, onChange }: DayFilterProps) {
  return <TextField type="date" label={label} value={value} error={error} onChange={({ target }) => onChange(target.value === '' ? null : target.value)} />;
}

/** The trail of one member as who acted. */
function Narrowed({ id, said, without }: { readonly id: string; readonly said: string; readonly without: string }) {
  const { data } = useQuery(memberPage(id));
  return (
    <NarrowedLine said={said} without={without}>
      <Link to={paths.registrarMember(id)}>{data?.displayName ?? id}</Link>
    </NarrowedLine>
  );
}

type NarrowedToProps = { readonly subject: AuditRow['subject']; readonly id: string; readonly without: string };

/** The trail of what was done to a member, a contribution or a fact, named as a row names it; where no row is left, a member by their page. */
function NarrowedTo({ subject, id, without }: NarrowedToProps) {
  if (subject === null || subject.kind === 'member') return <Narrowed id={id} said="Done to" without={without} />;
  const path = pathOfSubject(subject);
  return (
    <NarrowedLine said="Done to" without={without}>
      {path === null ? subject.name : <Link to={path}>{subject.name}</Link>}
    </NarrowedLine>
  );
}

/** A filter set by a link, with the way to take it away. */
function NarrowedLine({ said, without, children }: { readonly said: string; readonly without: string; readonly children: ReactNode }) {
  return (
    <p className="col-span-2 flex flex-wrap items-center gap-x-3 wide:col-span-3">
      <span className="text-slag">{said}</span> {children}
      <Link to={without} preventScrollReset className="inline-flex min-h-11 items-center">
        Take away
      </Link>
    </p>
  );
}
