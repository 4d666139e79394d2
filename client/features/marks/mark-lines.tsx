import type { MarkInShort } from '#contract/parts.ts';
import { Icon } from '../../ui/icon.tsx';
import { MarkText } from './mark-text.tsx';
import { sayDatesInShort, sayEvidence } from './mark-words.ts';

/** What a mark says: its plate, or why there is none to see. */
export function MarkReading({ mark: { reading, hidden } }: { readonly mark: Pick<MarkInShort, 'reading' | 'hidden'> }) {
  if (hidden) return <span className="text-slag italic">kept until you read it</span>;
  return reading === null ? <span className="text-slag italic">not read yet</span> : <MarkText text={reading} />;
}

/** What it can mean, in a line; nothing for a mark that is no date. */
export function MarkDatesLine({ mark: { kind, dates, hidden } }: { readonly mark: Pick<MarkInShort, 'kind' | 'dates' | 'hidden'> }) {
  if (kind !== 'date-code' || hidden) return null;
  return <>{dates === null ? '' : sayDatesInShort(dates)}</>;
}

/** Its strength of evidence, and whether another reading is wanted, in words with their signs. */
export function MarkEvidenceLine({ mark: { evidence, wantsReading } }: { readonly mark: Pick<MarkInShort, 'evidence' | 'wantsReading'> }) {
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3">
      <span className="inline-flex items-center gap-1.5">
        <Icon name={evidence === 'confirmed' || evidence === 'documented' ? 'check' : 'dash'} /> {sayEvidence(evidence).toLowerCase()}
      </span>
      {wantsReading && <span className="text-slag">wants another reading</span>}
    </span>
  );
}
