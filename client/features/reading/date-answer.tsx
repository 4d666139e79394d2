import { AnswerLines } from '../decode/answer-lines.tsx';
import { CandidateTable } from '../decode/candidate-table.tsx';
import { ThrownOut } from '../decode/thrown-out.tsx';
import type { Decoded } from '../decode/use-decoding.ts';
import { EmptyState } from '../../ui/empty-state.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';

type Props = {
  readonly decoded: Decoded;
  readonly text: string;
  /** What stands on the plate can't be asked about yet. */
  readonly isUnfinished: boolean;
  readonly tried: 'all' | 'one maker';
};

/** What the decoder makes of the mark so far, and which glyph would settle it. */
export function DateAnswer({ decoded: { answer, inHand, stale, error, again }, text, isUnfinished, tried }: Props) {
  if (error !== null) return <FailureNote error={error} onAgain={again} />;
  if (text === '') {
    return (
      <EmptyState title="Nothing on the plate yet">The dates it can mean stand here as you type, and which glyph, read for certain, would settle it.</EmptyState>
    );
  }
  if (answer === null) return isUnfinished ? null : <Skeleton lines={3} label="Decoding" />;
  return (
    <>
      <AnswerLines answer={answer} inHand={inHand} stale={stale} tried={tried} />
      {inHand !== null && inHand.candidates.length > 1 && <CandidateTable result={inHand} fit={null} serial="" stale={stale} />}
      {inHand !== null && inHand.candidates.length === 0 && <ThrownOut reasons={inHand.reasons} />}
    </>
  );
}
