// @ts-check
import { mkdir, readFile, rm } from 'node:fs/promises';
import { availableParallelism } from 'node:os';
import { findChromium } from './lib/chromium.mjs';
import { run } from './lib/children.mjs';
import { buildClient } from './lib/client-build.mjs';
import { holdDependencies } from './lib/dependencies.mjs';
import { alone } from './lib/lock.mjs';
import { inCache, packageBin } from './lib/project.mjs';
import { Trouble, say } from './lib/say.mjs';
import { performSteps } from './lib/steps.mjs';
import { holdTestDatabases } from './lib/test-databases.mjs';

/**
 * @typedef {import('./lib/steps.mjs').Step} Step
 * @typedef {import('./lib/steps.mjs').StepResult} StepResult
 * @typedef {{ passed: number, failed: number, skipped: number }} Totals
 */

/** The steps in the order they are begun, the longest first so that none is left to run alone, and those that must have passed before. */
const STEPS = /** @type {const} */ ({
  build: [],
  server: [],
  browser: ['build'],
  lint: [],
  types: [],
  client: [],
  domain: [],
  knip: [],
});

/** @typedef {keyof typeof STEPS} StepName */

const NAMES = /** @type {StepName[]} */ (Object.keys(STEPS));
/** Names of the steps that run tests. */
const TESTS = /** @type {const} */ (['domain', 'client', 'server', 'browser']);

/** The vitest projects of each. */
const PROJECTS = /** @type {const} */ ({ domain: 'domain *', client: 'client', server: 'server*', browser: 'browser' });

/** Milliseconds for one step: it hangs if it takes longer. */
const STEP_LIMIT = 20 * 60_000;

/** Settings of a server someone runs from the same shell, which the tests must not inherit. */
const NOT_FOR_TESTS = [
  'DATABASE_URL', 'HOST', 'PORT', 'PUBLIC_ORIGIN', 'LOG_LEVEL', 'TRUST_PROXY', 'CLIENT_DIR', 'MAIL_URL', 'MAIL_FROM', 'LOCAL_POST_DIR', 'NODE_ENV', 'TZ',
  'PHOTO_DIR', 'S3_BUCKET', 'S3_ENDPOINT', 'S3_REGION', 'S3_ACCESS_KEY_ID', 'S3_SECRET_ACCESS_KEY', 'S3_PATH_STYLE',
];

/**
 * `npm test`: everything for the tests, then lint, types and tests. `--only domain,lint` performs those steps alone; what
 * else is given goes to vitest, a file's name for one.
 * @param {readonly string[]} args
 * @returns {Promise<number>} exit code
 */
export async function test(args) {
  const { chosen, forVitest } = parseArguments(args);
  const packages = await holdDependencies();
  try {
    const chromium = chosen.includes('browser') ? await findChromium() : undefined;
    if (chromium !== undefined) say('Chromium', chromium);
    const needsDatabase = chosen.includes('server') || chosen.includes('browser');
    const databases = needsDatabase ? await holdTestDatabases() : undefined;
    try {
      const env = {
        ...Object.fromEntries(Object.entries(process.env).filter(([name]) => !NOT_FOR_TESTS.includes(name))),
        ...(chromium === undefined ? {} : { CHROMIUM_PATH: chromium }),
        ...(databases === undefined ? {} : { TEST_DATABASE_URL: databases.url }),
      };
      return await performChosen(chosen, forVitest, env, databases?.runId ?? 'none');
    } finally {
      await databases?.release();
    }
  } finally {
    await packages.release();
  }
}

/** @param {readonly string[]} args */
function parseArguments(args) {
  const at = args.indexOf('--only');
  if (at === -1) return { chosen: NAMES, forVitest: args };
  const wanted = (args[at + 1] ?? '').split(',');
  const unknown = wanted.filter((name) => !NAMES.some((step) => step === name));
  if (unknown.length > 0) throw new Trouble(`--only ${unknown.join(',')}: the steps are ${NAMES.join(', ')}`);
  const chosen = NAMES.filter((name) => wanted.includes(name) || NAMES.some((later) => wanted.includes(later) && needs(later, name)));
  return { chosen, forVitest: args.toSpliced(at, 2) };
}

/**
 * @param {StepName} later
 * @param {StepName} earlier
 */
function needs(later, earlier) {
  return STEPS[later].some((name) => name === earlier);
}

/**
 * @param {readonly StepName[]} chosen
 * @param {readonly string[]} forVitest
 * @param {NodeJS.ProcessEnv} env
 * @param {string} runId
 */
async function performChosen(chosen, forVitest, env, runId) {
  const began = performance.now();
  /** @type {Map<string, Totals>} */
  const totals = new Map();
  const reports = inCache('test-reports', `${runId}-${process.pid}`);
  await mkdir(reports, { recursive: true });

  /** @type {Record<StepName, () => Promise<StepResult>>} */
  const work = {
    build: async () => {
      const { code, output, fresh } = await buildClient();
      return { passed: code === 0, output, ...(fresh ? { note: 'built before' } : {}) };
    },
    lint: () => performTool('eslint', ['.', '--max-warnings', '0'], env),
    // Alone: the compiler's notes on what it has checked are shared by all runs of this clone.
    types: () => alone(inCache('types.lock'), () => performTool('tsc', ['-b', 'tsconfig.json', '.run/tsconfig.json'], env)),
    knip: () => performTool('knip', [], env),
    domain: () => performTests('domain'),
    client: () => performTests('client'),
    server: () => performTests('server'),
    browser: () => performTests('browser'),
  };

  /** @param {(typeof TESTS)[number]} name */
  const performTests = async (name) => {
    const report = `${reports}/${name}.json`;
    const result = await performTool(
      'vitest',
      [
        'run', '--project', PROJECTS[name], '--allowOnly=false',
        '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...forVitest,
      ],
      { ...env, TEST_RUN_ID: `${runId}_${name}` },
    );
    const counted = await readTotals(report);
    if (counted === undefined) return { ...result, passed: false };
    totals.set(name, counted);
    return { ...result, note: wordsFor(counted), passed: result.passed && counted.passed + counted.failed > 0 };
  };

  try {
    const steps = chosen.map((name) => ({ name, after: STEPS[name], perform: work[name] }));
    const lanes = Math.min(2, availableParallelism());
    const failed = await performSteps(steps, lanes, tell);
    const minutes = ((performance.now() - began) / 60_000).toFixed(1);
    say(failed.length === 0 ? 'passed' : 'FAILED', `${failed.length === 0 ? 'all steps' : failed.join(', ')} after ${minutes} min`);
    const tests = TESTS.filter((name) => chosen.includes(name));
    if (tests.length > 0 && tests.every((name) => totals.has(name))) {
      process.stdout.write(`${wordsFor(sum([...totals.values()]))}\n`);
    }
    return failed.length === 0 ? 0 : 1;
  } finally {
    await rm(reports, { recursive: true, force: true });
  }
}

/**
 * @param {Step} step
 * @param {StepResult} result
 * @param {number} seconds
 */
function tell(step, { passed, note, output = '' }, seconds) {
  if (!passed) process.stdout.write(output.endsWith('\n') || output === '' ? output : `${output}\n`);
  say(step.name, [passed ? 'passed' : 'FAILED', `${seconds.toFixed(1)} s`, ...(note === undefined ? [] : [note])].join('  '));
}

/**
 * @param {string} tool
 * @param {readonly string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<StepResult>}
 */
async function performTool(tool, args, env) {
  const { code, output } = await run(packageBin(tool), args, { env, limit: STEP_LIMIT });
  return { passed: code === 0, output };
}

/**
 * @param {string} report vitest's, as JSON
 * @returns {Promise<Totals | undefined>} undefined where vitest did not get so far as to write it
 */
async function readTotals(report) {
  const text = await readFile(report, 'utf8').catch(() => undefined);
  if (text === undefined) return undefined;
  const counts = /** @type {Record<'numPassedTests' | 'numFailedTests' | 'numPendingTests' | 'numTodoTests', number>} */ (JSON.parse(text));
  return { passed: counts.numPassedTests, failed: counts.numFailedTests, skipped: counts.numPendingTests + counts.numTodoTests };
}

/** @param {readonly Totals[]} all */
function sum(all) {
  return all.reduce(
    (left, right) => ({ passed: left.passed + right.passed, failed: left.failed + right.failed, skipped: left.skipped + right.skipped }),
    { passed: 0, failed: 0, skipped: 0 },
  );
}

/** @param {Totals} totals */
function wordsFor({ passed, failed, skipped }) {
  return `${passed} passed, ${failed} failed${skipped === 0 ? '' : `, ${skipped} skipped`}`;
}
