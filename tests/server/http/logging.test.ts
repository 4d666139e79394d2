import { describe, expect, test } from 'vitest';
import { ProblemError } from '#server/services/problem-error.ts';
import { keptLog } from '#tests/support/log.ts';

function logged(error: unknown): string {
  const log = keptLog();
  log.logger.error({ err: error }, 'problem');
  return log.text();
}

describe('an error in the log', () => {
  test('of the database is known by its codes and not by its text, which holds what people typed', () => {
    const native = Object.assign(new Error('duplicate key: Key (serial)=(canary) already exists'), {
      code: '23505',
      severity: 'ERROR',
      detail: 'canary',
      table: 'machines',
      constraint: 'machines_key',
    });
    const text = logged(Object.assign(new Error(native.message), { name: 'UniqueViolationError', nativeError: native }));
    expect(text).not.toContain('canary');
    expect(JSON.parse(text)).toMatchObject({
      err: { type: 'UniqueViolationError', code: '23505', table: 'machines', constraint: 'machines_key' },
    });
  });

  test('of ours keeps the words meant for the log, and its cause', () => {
    const cause = new TypeError('a hole in the answer');
    const text = logged(new ProblemError('internal', 'Something broke.', { internal: 'row 7 lacks a maker', cause }));
    expect(JSON.parse(text)).toMatchObject({
      err: { kind: 'internal', internal: 'row 7 lacks a maker', cause: { type: 'TypeError', message: 'a hole in the answer' } },
    });
  });

  test('that is no error is known by its kind', () => {
    expect(JSON.parse(logged('canary'))).toMatchObject({ err: { type: 'string' } });
    expect(logged('canary')).not.toContain('canary');
  });
});
