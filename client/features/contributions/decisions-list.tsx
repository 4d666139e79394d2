import { Link } from 'react-router-dom';
import type { ContributionPage } from '#contract/contributions.ts';
import { paths } from '../../lib/paths.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { DECISION_WORDS } from './contribution-words.ts';

/** What moderators did with a contribution so far, the oldest first, each with its reason. */
export function DecisionsList({ contribution: { decisions, enteredVersion, subject } }: { readonly contribution: ContributionPage }) {
  return (
    <ol className="max-w-measure border-t border-graphite">
      {decisions.map(({ decision, reason, by, at }) => (
        <li key={`${at} ${decision}`} className="border-b border-rule py-3">
          <p className="font-semibold">
            {DECISION_WORDS[decision]}
            {decision === 'enter' && enteredVersion !== null && subject !== null && (
              <>
                {' '}
                as <Link to={paths.factHistory(subject.id)}>version {enteredVersion}</Link>
              </>
            )}
          </p>
          <p className="whitespace-pre-line wrap-anywhere">{reason}</p>
          <p className="text-[15px] text-slag">
            {by.displayName} · <time dateTime={at}>{sayInstant(at)}</time>
          </p>
        </li>
      ))}
    </ol>
  );
}
