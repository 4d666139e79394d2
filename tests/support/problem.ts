import type supertest from 'supertest';
import { expect } from 'vitest';
import { Problem } from '#contract/problem.ts';

/** Awaits an answer that is to be a problem of this status, in the one shape all problems have. */
export async function problemOf(call: supertest.Test, status: number): Promise<Problem> {
  const response = await call;
  expect(response.status, response.text).toBe(status);
  expect(response.headers['content-type']).toBe('application/problem+json; charset=utf-8');
  const problem = Problem.strict().parse(response.body);
  expect(problem.status).toBe(status);
  expect(problem.requestId).toBe(response.headers['x-request-id']);
  expect(problem.detail).not.toBe('');
  return problem;
}

/** The paths of its faults, each as text. */
export function pathsOf({ errors }: Problem): readonly string[] {
  return (errors ?? []).map(({ path }) => path.join('.'));
}
