import type { ProblemError } from '../../lib/problem-error.ts';
import type { Explanation } from '../people/form-trouble.tsx';

/** The register says itself what stands in the way: another version, what rests on a fact, what another moderator did and when. */
export function explainConflict(problem: ProblemError): Explanation | null {
  return problem.kind === 'conflict' ? { title: 'Something stands in the way', advice: problem.message } : null;
}
