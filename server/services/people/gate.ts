import { ProblemError } from '#server/services/problem-error.ts';

/** Lets so many pieces of work run at once and so many more wait. */
export type Gate = <Answer>(work: () => Promise<Answer>) => Promise<Answer>;

/**
 * A gate that bounds what a burst of requests can take. Whoever finds the queue full is turned away.
 *
 * @throws ProblemError `unavailable`, from the gate.
 */
export function createGate({ atOnce, waiting }: { readonly atOnce: number; readonly waiting: number }): Gate {
  const queue: (() => void)[] = [];
  let running = 0;

  return async (work) => {
    if (running >= atOnce) {
      if (queue.length >= waiting) throw new ProblemError('unavailable', 'Too many people are signing in just now. Try again in a moment.');
      // Whoever leaves hands its place over, so nobody who comes later gets in between.
      await new Promise<void>((resolve) => queue.push(resolve));
    } else {
      running += 1;
    }
    try {
      return await work();
    } finally {
      const next = queue.shift();
      if (next) next();
      else running -= 1;
    }
  };
}
