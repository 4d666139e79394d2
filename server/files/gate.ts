/** Raised when too much waits at a gate already. */
export class GateFullError extends Error {
  constructor() {
    super('Too much waits already');
    this.name = 'GateFullError';
  }
}

export type Gate = {
  /** Does the work once there is room for its weight; what is urgent goes before what is not. */
  readonly pass: <Answer>(work: () => Promise<Answer>, options?: { readonly weight?: number; readonly urgent?: boolean }) => Promise<Answer>;
};

type Waiter = { readonly weight: number; readonly enter: () => void };

/**
 * Lets so much work through at once and no more.
 *
 * @param room the weights that fit in together; heavier work counts as this much
 * @param mostWaiting urgent work that may wait; beyond it GateFullError
 */
export function createGate(room: number, mostWaiting: number): Gate {
  const urgentOnes: Waiter[] = [];
  const others: Waiter[] = [];
  let inside = 0;

  const letIn = (): void => {
    for (;;) {
      const queue = urgentOnes.length > 0 ? urgentOnes : others;
      const next = queue[0];
      if (next === undefined || inside + next.weight > room) return;
      queue.shift();
      inside += next.weight;
      next.enter();
    }
  };

  return {
    pass: async (work, { weight: asked = 1, urgent = false } = {}) => {
      if (urgent && urgentOnes.length >= mostWaiting) throw new GateFullError();
      const weight = Math.min(asked, room);
      await new Promise<void>((enter) => {
        (urgent ? urgentOnes : others).push({ weight, enter });
        letIn();
      });
      try {
        return await work();
      } finally {
        inside -= weight;
        letIn();
      }
    },
  };
}
