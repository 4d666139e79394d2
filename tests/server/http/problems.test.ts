import { describe, expect, test } from 'vitest';
import { Problem, PROBLEMS, PROBLEM_KINDS } from '#contract/problem.ts';
import { problemOf, retryAfter, writeProblem } from '#server/http/problems.ts';
import { ProblemError } from '#server/services/problem-error.ts';

function errorWith(fields: Readonly<Record<string, unknown>>, message = 'secret text'): Error {
  return Object.assign(new Error(message), fields);
}

describe('an error as a problem', () => {
  test.each([
    ['unique violation', { code: '23505' }, 'conflict'],
    ['exclusion violation', { code: '23P01' }, 'conflict'],
    ['foreign key violation', { code: '23503' }, 'conflict'],
    ['check violation', { code: '23514' }, 'invalid'],
    ['not-null violation', { code: '23502' }, 'invalid'],
    ['data exception of any kind', { code: '22P05' }, 'invalid'],
    ['statement timeout', { code: '57014' }, 'unavailable'],
    ['administrator shutdown', { code: '57P01' }, 'unavailable'],
    ['starting up', { code: '57P03' }, 'unavailable'],
    ['too many connections', { code: '53300' }, 'unavailable'],
    ['deadlock', { code: '40P01' }, 'unavailable'],
    ['lock not available', { code: '55P03' }, 'unavailable'],
    ['refused connection', { code: 'ECONNREFUSED', syscall: 'connect' }, 'unavailable'],
    ['name that does not resolve', { code: 'ENOTFOUND', syscall: 'getaddrinfo' }, 'unavailable'],
    ['pool without a free connection', { name: 'KnexTimeoutError' }, 'unavailable'],
    ['file that is missing', { code: 'ENOENT', syscall: 'stat', status: 404 }, 'not-found'],
    ['body that is too large', { status: 413, type: 'entity.too.large' }, 'too-large'],
    ['status we have no kind for', { status: 418 }, 'malformed'],
    ['syntax error in our SQL', { code: '42601' }, 'internal'],
    ['anything else', {}, 'internal'],
  ] as const)('%s', (_name, fields, kind) => {
    expect(problemOf(errorWith(fields)).kind).toBe(kind);
  });

  test('is found in the error that the query builder wraps', () => {
    expect(problemOf(errorWith({ nativeError: errorWith({ code: '23505' }) })).kind).toBe('conflict');
  });

  test('is found among the addresses a name stands for', () => {
    const refused = errorWith({ code: 'ECONNREFUSED', syscall: 'connect' });
    expect(problemOf(new AggregateError([refused, refused])).kind).toBe('unavailable');
  });

  test.each([
    'Connection terminated unexpectedly',
    'select 1 - Connection terminated unexpectedly',
    'timeout expired',
    'Client has encountered a connection error and is not queryable',
    'Client was closed and is not queryable',
  ])('is unavailable when the driver lost its connection and gives no code: %s', (message) => {
    expect(problemOf(new Error(message)).kind).toBe('unavailable');
  });

  test('is internal when it is no error at all', () => {
    expect(problemOf('thrown text').kind).toBe('internal');
  });

  test('stays what it was when a service raised it', () => {
    const problem = new ProblemError('conflict', 'Somebody else was first.');
    expect(problemOf(problem)).toBe(problem);
  });
});

describe('a written problem', () => {
  test('is of the shape of RFC 9457 for every kind, and never holds the text of what went wrong', () => {
    for (const kind of PROBLEM_KINDS) {
      const written = writeProblem(new ProblemError(kind, 'Words for a reader.', { cause: errorWith({}), internal: 'secret text' }), 'id-1');
      expect(Problem.parse(written)).toEqual({
        type: `/problems/${kind}`,
        title: PROBLEMS[kind].title,
        status: PROBLEMS[kind].status,
        detail: 'Words for a reader.',
        requestId: 'id-1',
      });
    }
    expect(JSON.stringify(writeProblem(problemOf(errorWith({ code: '23505' })), 'id-1'))).not.toContain('secret');
  });

  test('lists a hundred faults and counts the rest', () => {
    const errors = Array.from({ length: 103 }, (_, place) => ({ path: ['list', place], message: 'Wrong' }));
    const written = writeProblem(new ProblemError('invalid', 'See errors.', { errors }), 'id-1');
    expect(written.errors).toHaveLength(100);
    expect(written.detail).toBe('See errors. 3 more faults are not listed.');
  });

  test('says when to try again only where that helps', () => {
    expect(PROBLEM_KINDS.filter((kind) => retryAfter(kind) !== undefined)).toEqual(['too-many-requests', 'unavailable']);
  });
});
