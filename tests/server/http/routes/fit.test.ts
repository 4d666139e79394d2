import type supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import { FitAnswer } from '#contract/fit.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const app = useApp(useDatabase());

function ask(question: object): supertest.Test {
  return app.agent.post('/api/fit').send(question);
}

const YEAR = { from: '1939-01-01', to: '1939-12-31' };
const day = (date: string, share = 1): object => ({ from: date, to: date, share });

describe('judging the fit', () => {
  // The worked table of the specification of the fit; figures to four places.
  test.each([
    [YEAR, [day('1939-03-12')], { least: 0, most: 365 }, [0.1918, 0.8082, 0], 'possible'],
    [YEAR, [day('1938-09-20')], { least: 0, most: 365 }, [0, 0.7205, 0.2795], 'possible'],
    [YEAR, [day('1938-12-31')], { least: 0, most: 365 }, [0, 1, 0], 'in-step'],
    [YEAR, [day('1943-02-02')], { least: 0, most: 365 }, [1, 0, 0], 'cast-after-build'],
    [{ from: '1941-02-10', to: '1941-03-10' }, [day('1941-01-13', 0.5), day('1941-11-03', 0.5)], { least: 0, most: 365 }, [0.5, 0.5, 0], 'unsettled'],
    [{ from: '1938-02-01', to: '1938-04-30' }, [{ from: '1937-03-01', to: '1937-03-31', share: 1 }], { least: 0, most: 365 }, [0, 0.4944, 0.5056], 'possible'],
    [{ from: '1938-02-01', to: '1938-04-30' }, [day('1935-07-04')], undefined, [0, 1, 0], 'in-step'],
  ])('built %j, cast %j, lead %j', async (build, candidates, lead, [late, inStep, early], verdict) => {
    const response = await ask({ build, candidates, ...(lead ? { lead } : {}) });
    const answer = FitAnswer.parse(response.body);
    expect(answer.late).toBeCloseTo(late ?? NaN, 4);
    expect(answer.in).toBeCloseTo(inStep ?? NaN, 4);
    expect(answer.early).toBeCloseTo(early ?? NaN, 4);
    expect(answer).toMatchObject({ verdict, leadOnRecord: lead !== undefined });
  });

  test('says of an unsettled part which candidate would make it what', async () => {
    const question = { build: { from: '1941-02-10', to: '1941-03-10' }, candidates: [day('1941-01-13', 0.5), day('1941-11-03', 0.5)], lead: { least: 0, most: 365 } };
    const answer = FitAnswer.parse((await ask(question)).body);
    expect(answer.candidates.map(({ from, verdict }) => [from, verdict])).toEqual([
      ['1941-01-13', 'in-step'],
      ['1941-11-03', 'cast-after-build'],
    ]);
    expect(answer.wouldSettle).toEqual([
      { verdict: 'in-step', share: 0.5, candidates: [0] },
      { verdict: 'cast-after-build', share: 0.5, candidates: [1] },
    ]);
  });

  test('counts lead days over calendar days, whatever the machine’s zone does with its clocks', async () => {
    // 28 March to 25 April 1918: the clocks of this zone went forward for the first time on 31 March.
    const answer = FitAnswer.parse((await ask({ build: { from: '1918-04-25', to: '1918-04-25' }, candidates: [day('1918-03-28')] })).body);
    expect(answer.candidates[0]).toMatchObject({ from: '1918-03-28', to: '1918-03-28', leadDays: { least: 28, most: 28 } });
  });
});

describe('a question about a fit that makes no sense', () => {
  const good = { build: YEAR, candidates: [day('1939-03-12')] };

  test.each([
    ['nothing', {}, ['candidates', 'build']],
    ['no candidates', { ...good, candidates: [] }, ['candidates']],
    ['201 candidates', { ...good, candidates: Array.from({ length: 201 }, () => day('1939-03-12', 0.001)) }, ['candidates']],
    ['a month 13', { ...good, build: { from: '1939-13-01', to: '1939-12-31' } }, ['build.from']],
    ['a window that ends before it begins', { ...good, build: { from: '1939-02-01', to: '1939-01-31' } }, ['build.to']],
    ['a share above one', { ...good, candidates: [day('1939-03-12', 1.5)] }, ['candidates.0.share']],
    ['a share of nothing', { ...good, candidates: [day('1939-03-12', 0)] }, ['candidates.0.share']],
    ['a negative lead', { ...good, lead: { least: -1, most: 365 } }, ['lead.least']],
    ['a lead that ends before it begins', { ...good, lead: { least: 10, most: 9 } }, ['lead.most']],
    ['a lead of half days', { ...good, lead: { least: 0.5, most: null } }, ['lead.least']],
    ['keys nobody knows', { ...good, model: 'x', build: { ...YEAR, year: 1939 } }, ['build.year', 'model']],
  ])('%s', async (_name, question, paths) => {
    expect(pathsOf(await problemOf(ask(question), 422)).toSorted()).toEqual(paths.toSorted());
  });
});
