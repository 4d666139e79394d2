import type { FactSource } from '#contract/common.ts';
import type { BuildAnswer, Position } from '#contract/models.ts';
import { sayMoment } from '../../lib/say-date.ts';
import type { Note } from '../../ui/margin-notes.tsx';
import { SourceLine } from '../../ui/source-line.tsx';
import { sayNumbers } from './build-words.ts';

export type MachineNotes = {
  readonly notes: readonly Note[];
  /** The note of the nth account of the build. */
  readonly accountNumbers: (place: number) => readonly number[];
  readonly leadNumbers: readonly number[];
};

type Account = BuildAnswer['accounts'][number];

/** The margin beside a machine: each account of its build, and the accepted lead. `from` is the first number to give. */
export function machineNotes(build: BuildAnswer | null, position: Position | null, from: number): MachineNotes {
  const accounts = (build?.accounts ?? []).map((account, place): Note => ({
    number: from + place,
    heading: `${account.account.title}.`,
    body: <AccountLine account={account} />,
    fine: <Sources sources={account.sources} besides={account.account.title} />,
  }));
  const lead = position === null || position.lead === null ? null : leadNote(position, from + accounts.length);
  return {
    notes: lead === null ? accounts : [...accounts, lead],
    accountNumbers: (place) => (place < accounts.length ? [from + place] : []),
    leadNumbers: lead === null ? [] : [from + accounts.length],
  };
}

function AccountLine({ account: { series, range } }: { readonly account: Account }) {
  const run = [series.works, series.label].filter((part) => part !== null).join(', ');
  if (range === null) return <>{run === '' ? 'Has no range for this number.' : `${run}: has no range for this number.`}</>;
  return (
    <>
      Range <span className="font-mono">{sayNumbers(range, series.prefix)}</span>
      {run !== '' && `, ${run}`}, {STANDINGS[range.standing]}
      {range.inOrder && ', numbers issued in order'}.
    </>
  );
}

const STANDINGS: Readonly<Record<NonNullable<Account['range']>['standing'], string>> = {
  solid: 'solid',
  interpolated: 'worked out between known numbers',
  conjectural: 'a conjecture',
};

/** A source whose title the note's heading has said already is named by its place alone. */
function Sources({ sources, besides = '' }: { readonly sources: readonly FactSource[]; readonly besides?: string }) {
  if (sources.length === 0) return <SourceLine source={null} />;
  return sources.map((source) => (
    <span key={`${source.source.slug} ${source.locator ?? ''} ${source.field ?? ''}`} className="block">
      <SourceLine source={source} {...(source.source.title === besides && source.locator !== null ? { words: source.locator } : {})} />
    </span>
  ));
}

function leadNote({ provenance }: Position, number: number): Note {
  const behind = provenance.sources.filter(({ field }) => field === null || field === 'lead');
  return {
    number,
    heading: 'Lead.',
    body: <Sources sources={behind} />,
    fine: `Entered by ${provenance.enteredBy}, ${sayMoment(provenance.enteredAt)}.`,
  };
}
