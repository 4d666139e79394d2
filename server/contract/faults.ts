import type { z } from 'zod';
import type { FieldFault } from './problem.ts';

type Issue = z.core.$ZodIssue;

/**
 * Every fault of a failed parse with its path, one for each wrong value: a key that is not taken is named by its own path, and of
 * several shapes a value may have, the faults of the one it comes nearest to are told.
 */
export function faultsOf(error: z.core.$ZodError): FieldFault[] {
  return error.issues.flatMap((issue) => faultsOfIssue(issue, []));
}

function faultsOfIssue(issue: Issue, outer: FieldFault['path']): FieldFault[] {
  const path = [...outer, ...issue.path.map((step) => (typeof step === 'symbol' ? step.toString() : step))];
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({ path: [...path, key], message: 'Nothing of this name is taken here' }));
  }
  const inside = issue.code === 'invalid_union' ? nearestShape(issue.errors) : issue.code === 'invalid_key' ? issue.issues : undefined;
  if (inside) return inside.flatMap((inner) => faultsOfIssue(inner, path));
  const isMissing = issue.code === 'invalid_type' && issue.message.endsWith('received undefined');
  return [{ path, message: isMissing ? 'Missing' : issue.message }];
}

/** The shape whose own kind was right, if there is one: its faults lie inside the value or in what it says, not in what it is. */
function nearestShape(shapes: readonly (readonly Issue[])[]): readonly Issue[] | undefined {
  return shapes.find((issues) => issues.every((issue) => issue.code !== 'invalid_type' || issue.path.length > 0));
}
