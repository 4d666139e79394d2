import type { ErrorRequestHandler, Response } from 'express';
import { PROBLEMS } from '#contract/problem.ts';
import type { ProblemError } from '#server/services/problem-error.ts';
import { requestIdOf } from '../logging.ts';
import { problemOf, retryAfter, writeProblem } from '../problems.ts';

/** The one place where a failure becomes an answer. What the caller could not have known is written to the log with its cause. */
export const answerProblems: ErrorRequestHandler = (error, request, response, next) => {
  const problem = problemOf(error);
  const { status } = PROBLEMS[problem.kind];
  if (status >= 500) request.log.error({ err: problem }, 'problem');
  else request.log.debug({ err: problem }, 'problem');

  if (response.headersSent) {
    next(error);
    return;
  }
  answer(response, problem, requestIdOf(request));
};

function answer(response: Response, problem: ProblemError, requestId: string): void {
  const { status } = PROBLEMS[problem.kind];
  const seconds = problem.retryAfter ?? retryAfter(problem.kind);
  if (seconds !== undefined) response.set('Retry-After', String(seconds));
  response
    .status(status)
    .set('Cache-Control', 'no-store')
    .type('application/problem+json')
    .send(JSON.stringify(writeProblem(problem, requestId)));
}
