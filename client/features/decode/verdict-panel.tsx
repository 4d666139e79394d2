import { Live } from '../../ui/live.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { Verdict, VERDICTS } from '../../ui/verdict.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { BuildLines } from './build-lines.tsx';
import { FitFigures } from './fit-figures.tsx';
import { fitWords } from './fit-words.ts';
import type { MachineNotes } from './machine-notes.tsx';
import { sayAcceptedLead } from './say-lead.ts';
import type { Held } from './use-fit.ts';

type Props = {
  readonly held: Held;
  readonly notes: MachineNotes;
  /** Why there is a machine but nothing to hold against it; null where there is. */
  readonly missing: string | null;
};

/** What the serial says of the build, and what the fit is. */
export function VerdictPanel({ held, notes, missing }: Props) {
  const { build, fit, loading, stale, error, again, position } = held;
  if (error !== null) return <FailureNote error={error} onAgain={again} />;
  if (build === null) return loading ? <Skeleton lines={4} label="Looking up the serial" /> : null;
  const words = fit === null ? '' : fitWords(fit);
  return (
    <div className={stale ? 'is-stale-block' : ''}>
      <BuildLines build={build} notes={notes} />
      {fit === null ? (
        loading ? (
          <Skeleton lines={3} label="Holding the dates against the build" />
        ) : (
          build.window !== null && missing !== null && <p className="mt-4">{missing}</p>
        )
      ) : (
        <div className="mt-6">
          <p>
            <Verdict kind={fit.verdict} size="heading" />
          </p>
          <p className="mt-1 max-w-measure text-[19px] leading-snug">{words}</p>
          <FitFigures fit={fit} />
          <p className="mt-3 max-w-measure text-[15px] leading-snug text-slag">
            {fit.leadOnRecord ? (
              <>
                Accepted lead from casting to building, {position?.name.toLowerCase()}: {sayAcceptedLead(fit.lead)}
                <NoteRef numbers={notes.leadNumbers} />.
              </>
            ) : (
              <>
                No lead is on record {position === null ? 'unless you say where the part sits' : `for this position (${position.name.toLowerCase()})`}: any day up
                to the build is taken as in step, and “older stock” is never said.
              </>
            )}{' '}
            Dates can only show that a part could have been there.
          </p>
        </div>
      )}
      <Live>{stale || fit === null ? '' : `${VERDICTS[fit.verdict].word}. ${words}`}</Live>
    </div>
  );
}
