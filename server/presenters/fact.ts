import { LoosePayload } from '#contract/contributions.ts';
import type { FactRef, Person } from '#contract/contributions.ts';
import type { Citation } from '#contract/citations.ts';
import type { FactHistory, listFacts } from '#contract/facts.ts';
import type { AnswerOf } from '#contract/endpoint.ts';
import type { FactCitation } from '#db/models/fact-citation.ts';
import type { Member } from '#db/models/member.ts';
import type { Source } from '#db/models/source.ts';
import type { FactToChoose } from '#server/services/facts/list-facts.ts';
import type { NamedFact } from '#server/services/facts/name-facts.ts';
import type { FactHistoryOnRecord, StepOnRecord } from '#server/services/facts/read-fact-history.ts';
import { presentNamed } from './common.ts';
import { loaded } from './loaded.ts';

type HistoryStep = FactHistory['steps'][number];

export function presentFactRef({ id, kind, slug, title }: Omit<NamedFact, 'makerId'>): FactRef {
  return { id, kind, slug, title };
}

export function presentPerson({ id, displayName }: Pick<Member, 'id' | 'displayName'>): Person {
  return { id, displayName };
}

export function presentCitedSource({ id, slug, title }: Source): { id: string; slug: string; title: string } {
  return { id, slug, title };
}

/** Of a version every source is on record. */
export function presentCitation({ sourceId, field, locator, note }: FactCitation): Citation {
  return { sourceId, newSource: null, field, locator, note };
}

export function presentFactToChoose({ fact, maker }: FactToChoose): AnswerOf<typeof listFacts>['items'][number] {
  return { ...presentFactRef(fact), maker: maker && presentNamed(maker) };
}

export function presentFactHistory({ fact, inForce, steps, names, workingOut, can }: FactHistoryOnRecord): FactHistory {
  return {
    fact: presentFactRef(fact),
    inForce,
    steps: steps.map(presentStep),
    names: names.facts.map(presentFactRef),
    sources: names.sources.map(presentCitedSource),
    workingOut,
    can,
  };
}

function presentStep(onRecord: StepOnRecord): HistoryStep {
  const { version } = onRecord;
  const said = { version: version.number, payload: LoosePayload.parse(version.payload), citations: version.citations.map(presentCitation) };
  if (onRecord.step === 'retired') {
    const { retirement } = onRecord;
    const by = presentPerson(loaded(retirement.retiredBy));
    const { at, reason } = retirement;
    return { ...said, step: 'retired', inForce: false, by, decidedBy: by, at, reason, contributionId: null, broughtBack: null, differences: [] };
  }
  return {
    ...said,
    step: 'version',
    inForce: version.inForce,
    by: presentPerson(loaded(version.enteredBy)),
    decidedBy: version.decidedBy && presentPerson(version.decidedBy),
    at: version.enteredAt,
    reason: version.reason,
    contributionId: version.contributionId,
    broughtBack: version.broughtBack,
    differences: [...onRecord.differences],
  };
}
