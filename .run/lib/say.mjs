// @ts-check

/** Something the person at the terminal has to mend. Its message is one line: what is wrong, then what to do. */
export class Trouble extends Error {}

/**
 * One line of progress.
 * @param {string} subject what it is about
 * @param {string} line
 */
export function say(subject, line) {
  process.stdout.write(`${subject.padEnd(12)} ${line}\n`);
}

/**
 * The line of a failed program's output that tells most, for a message of one line.
 * @param {string} output
 * @param {RegExp} telling
 */
export function tellingLine(output, telling) {
  const lines = output.split('\n').map((line) => line.trim()).filter((line) => line !== '');
  return lines.findLast((line) => telling.test(line)) ?? lines.at(-1) ?? 'it said nothing';
}
