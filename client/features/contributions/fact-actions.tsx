import { useState } from 'react';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.ts';
import { FlagForm } from './flag-form.tsx';

type Props = {
  readonly factId: string;
  /** What the fact is, where several stand on one page: each link says of which it speaks. */
  readonly name?: string;
};

const SUMMARY = 'inline-flex min-h-11 cursor-pointer items-center text-temper underline decoration-1 underline-offset-[3px]';

/** What anybody can do about a fact: put a change forward, or flag it. Stands below its version in the margin. */
export function FactActions({ factId, name }: Props) {
  return (
    <div className="no-print text-[15px] leading-snug">
      <Deeds factId={factId} name={name} />
    </div>
  );
}

/** The same for a fact that is one row of a page and has none of its own, folded away with its history. */
export function RowActions({ factId, name }: Required<Props>) {
  return (
    <details className="no-print text-[15px] leading-snug font-normal">
      <summary className={SUMMARY}>
        Correct it<span className="sr-only">: {name}</span>
      </summary>
      <p>
        <Link to={paths.factHistory(factId)} className="inline-flex min-h-11 items-center">
          What changed<span className="sr-only">: {name}</span>
        </Link>
      </p>
      <Deeds factId={factId} name={name} />
    </details>
  );
}

function Deeds({ factId, name }: { readonly factId: string; readonly name: string | undefined }) {
  const [isFlagging, setIsFlagging] = useState(false);
  const of = name === undefined ? null : <span className="sr-only">: {name}</span>;
  return (
    <>
      <p>
        <Link to={paths.changeFact(factId)} className="inline-flex min-h-11 items-center">
          Put a change forward{of}
        </Link>
      </p>
      <details onToggle={({ currentTarget }) => setIsFlagging(currentTarget.open)}>
        <summary className={SUMMARY}>Flag it{of}</summary>
        {isFlagging && <FlagForm factId={factId} />}
      </details>
    </>
  );
}
