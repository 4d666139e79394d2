import { Link } from 'react-router-dom';
import type { FactHistory } from '#contract/facts.ts';
import { formOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import type { Note } from '../../ui/margin-notes.tsx';
import { citationNotes } from '../contributions/citation-notes.ts';

export type Step = FactHistory['steps'][number];

/** The margin of a version: under whose name it stands, who decided, and what stands behind it. */
export function stepNotes(step: Step, { fact, sources }: Pick<FactHistory, 'fact' | 'sources'>): readonly Note[] {
  const { by, decidedBy, at, contributionId } = step;
  const who: Note = {
    number: null,
    body: (
      <>
        <Link to={paths.contributor(by.id)}>{by.displayName}</Link> {step.step === 'retired' ? 'retired it' : contributionId === null ? 'entered it' : 'put it forward'}
        {decidedBy !== null && decidedBy.id !== by.id && <>, {decidedBy.displayName} entered it</>}, {sayMoment(at)}.
      </>
    ),
    ...(contributionId === null ? {} : { fine: <Link to={paths.contribution(contributionId)}>The contribution</Link> }),
  };
  if (step.step === 'retired') return [who];
  return [
    who,
    ...citationNotes(step.citations, sources).map(
      ({ title, slug, locator, remark, about, field }): Note => ({
        number: null,
        body: (
          <>
            {slug === null ? title : <Link to={paths.source(slug)}>{title}</Link>}
            {locator !== null && `, ${locator}`}.{remark !== null && ` ${remark}`}
          </>
        ),
        ...(about === null && field === null ? {} : { fine: [about, field === null ? null : `Behind ${sayPart(fact.kind, field)}.`].filter((part) => part !== null).join(' ') }),
      }),
    ),
  ];
}

/** The part of a fact a source stands behind, as its form calls it: `tells.2` → `how to tell it, 2`. */
function sayPart(kind: FactKind, field: string): string {
  const [key = '', row] = field.split('.');
  const label = formOf(kind).fields.find((one) => one.key === key)?.label.toLowerCase() ?? key;
  return row === undefined ? label : `${label}, ${row}`;
}
