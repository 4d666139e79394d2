// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { ProblemError, problemOfKind, UnreachableError } from '#client/lib/problem-error.ts';
import { sayFailure } from '#client/lib/say-failure.ts';
import { PROBLEM_KINDS } from '#contract/problem.ts';

describe('sayFailure', () => {
  it.each(PROBLEM_KINDS)('has words for %s', (kind) => {
    const { title, advice } = sayFailure(problemOfKind(kind));
    expect(title).toMatch(/^[A-Z].*[^.!]$/);
    expect(advice).toMatch(/^[A-Z][^!]*\.$/);
  });
  it.each(['offline', 'timeout', 'no-answer'] as const)('says %s and that what was typed is kept', (reason) => {
    expect(sayFailure(new UnreachableError(reason, null))).toMatchObject({ again: true, requestId: null });
    expect(sayFailure(new UnreachableError(reason, null)).advice).toContain('What you typed is kept');
  });
  it('says how long to wait, and the number of the request', () => {
    const away = new ProblemError({ kind: 'unavailable', status: 503, detail: '', faults: [], requestId: 'r-9', retryAfter: 1 });
    expect(sayFailure(away)).toMatchObject({ advice: 'What you typed is kept. Ask again in 1 second.', requestId: 'r-9', again: true });
  });
  it('passes on what is wrong with a value', () => {
    const wrong = new ProblemError({ kind: 'invalid', status: 422, detail: 'd', faults: [{ path: ['to'], message: 'The last day is before the first' }], requestId: null, retryAfter: null });
    expect(sayFailure(wrong)).toMatchObject({ advice: 'The last day is before the first', again: false });
  });
  it('does not show the insides of what it does not know', () => {
    expect(JSON.stringify(sayFailure(new TypeError('x is undefined')))).not.toContain('undefined');
  });
});
