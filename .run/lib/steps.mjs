// @ts-check

/**
 * @typedef {object} Step
 * @property {string} name
 * @property {readonly string[]} [after] names of steps that must have passed before
 * @property {() => Promise<StepResult>} perform
 *
 * @typedef {object} StepResult
 * @property {boolean} passed
 * @property {string} [note] a few words for the line about the step
 * @property {string} [output] shown where it did not pass
 */

/**
 * Performs steps, several at a time and otherwise in their order, and says of each how it went. All that can run do,
 * whatever else failed.
 * @param {readonly Step[]} steps `after` names only steps among them
 * @param {number} lanes how many at a time
 * @param {(step: Step, result: StepResult, seconds: number) => void} tell
 * @returns {Promise<string[]>} names of those that failed or could not run
 */
export async function performSteps(steps, lanes, tell) {
  const waiting = [...steps];
  /** @type {Map<string, boolean>} */
  const passed = new Map();
  /** @type {Set<Promise<void>>} */
  const running = new Set();

  /** @param {Step} step */
  const perform = async (step) => {
    const began = performance.now();
    const result = await step.perform();
    passed.set(step.name, result.passed);
    tell(step, result, (performance.now() - began) / 1000);
  };

  while (waiting.length > 0 || running.size > 0) {
    const hopeless = waiting.find(({ after = [] }) => after.some((name) => passed.get(name) === false));
    if (hopeless !== undefined) {
      waiting.splice(waiting.indexOf(hopeless), 1);
      passed.set(hopeless.name, false);
      tell(hopeless, { passed: false, note: `not run: it needs ${String(hopeless.after?.join(', '))}` }, 0);
      continue;
    }
    const next = running.size < lanes ? waiting.find(({ after = [] }) => after.every((name) => passed.get(name) === true)) : undefined;
    if (next !== undefined) {
      waiting.splice(waiting.indexOf(next), 1);
      const performing = perform(next).finally(() => running.delete(performing));
      running.add(performing);
      continue;
    }
    if (running.size === 0) throw new Error(`steps wait for each other: ${waiting.map(({ name }) => name).join(', ')}`);
    await Promise.race(running);
  }
  return steps.filter(({ name }) => passed.get(name) !== true).map(({ name }) => name);
}
