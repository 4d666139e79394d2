import type { FitAnswer } from '#contract/fit.ts';
import { saySpan } from '../../lib/say-date.ts';
import { capital, sayList } from '../../lib/say-number.ts';
import { VERDICTS } from '../../ui/verdict.tsx';
import { sayLeadDays } from './say-lead.ts';

const NAMED = 2;

/** Why the verdict is what it is, in a sentence. */
export function fitWords(fit: FitAnswer): string {
  const heard = fit.candidates.filter(({ counts }) => counts);
  const [only] = heard;
  if (fit.verdict === 'unsettled') return `${capital(sayList(fit.wouldSettle.map((one) => sayWay(one, fit)), 'and'))}.`;
  if (heard.length === 1 && only !== undefined) return `Poured ${sayLeadDays(only.leadDays)}.`;
  const leads = { least: Math.min(...heard.map(({ leadDays }) => leadDays.least)), most: Math.max(...heard.map(({ leadDays }) => leadDays.most)) };
  switch (fit.verdict) {
    case 'in-step':
      return `Every date it can mean lies ${sayLeadDays(leads)}.`;
    case 'cast-after-build':
      return `Every date it can mean is too late: ${sayLeadDays(leads)}.`;
    case 'older-stock':
      return `Every date it can mean is earlier than the accepted lead: ${sayLeadDays(leads)}.`;
    case 'possible':
      return `It depends on the very day: ${sayLeadDays(leads)}.`;
  }
}

/** `in step if 13 Jan 1941`: which candidates would make it what. */
function sayWay({ verdict, candidates }: FitAnswer['wouldSettle'][number], fit: FitAnswer): string {
  const dates = candidates.flatMap((place) => fit.candidates[place] ?? []).map(saySpan);
  const said = dates.length > NAMED + 1 ? [...dates.slice(0, NAMED), `${dates.length - NAMED} others`] : dates;
  return `${VERDICTS[verdict].word.toLowerCase()} if ${sayList(said, 'or')}`;
}
