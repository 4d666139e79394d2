import { mkdir, mkdtemp, readdir, realpath, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { dirname, join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ESLint } from 'eslint';
import ts from 'typescript';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const TABLE_RULE = 'import-x/no-restricted-paths';

const ADAPTERS = ['server/queue', 'server/files', 'server/mail'];
const DEEDS = ['server/services', 'server/policies', 'server/presenters'];
const OUTER_RING = ['server/http', 'server/auth', 'server/jobs'];
const UNDER_SERVICES = ['server/domain', 'server/contract', 'db', ...ADAPTERS];

/** The import table of DEVELOPERS.md, written down a second time so that a slip in the configuration shows. */
const MAY_IMPORT = new Map([
  ['server/domain', ['server/domain']],
  ['server/contract', ['server/domain', 'server/contract']],
  ['client', ['server/domain', 'server/contract', 'client']],
  ['db', ['server/domain', 'db']],
  ...ADAPTERS.map((place) => [place, UNDER_SERVICES] as const),
  ...DEEDS.map((place) => [place, [...UNDER_SERVICES, ...DEEDS]] as const),
  ...OUTER_RING.map((place) => [place, [...UNDER_SERVICES, ...DEEDS, ...OUTER_RING]] as const),
  ['fixtures', ['server/domain', 'server/contract', 'db', 'fixtures']],
]);
const PLACES = [...MAY_IMPORT.keys(), 'tests'];

/** Packages on which the rows differ; rows that are not named may import any. */
const PACKAGES = ['date-fns', 'zod', 'react', 'express', 'knex'];
const PACKAGES_ALLOWED = new Map([
  ['server/domain', ['date-fns']],
  ['server/contract', ['zod']],
  ['client', ['react', 'zod']],
]);

const ZoneOptions = z.tuple([z.unknown(), z.looseObject({ basePath: z.string(), zones: z.array(z.unknown()) })]);

/** A tree of the project's shape with one file in every place, so that each arrow has something to point at. */
let tree: string;
let eslint: ESLint;

beforeAll(async () => {
  tree = await realpath(await mkdtemp(join(tmpdir(), 'import-table-')));
  const imports: Record<string, string> = { '#domain/*': './server/domain/*', '#contract/*': './server/contract/*' };
  for (const area of ['server', 'db', 'fixtures', 'client', 'tests']) imports[`#${area}/*`] = `./${area}/*`;
  await plant('package.json', JSON.stringify({ type: 'module', imports }));
  await Promise.all([
    ...PLACES.map((place) => plant(`${place}/planted.ts`, 'export const planted = 1;\n')),
    ...PACKAGES.flatMap((name) => [
      plant(`node_modules/${name}/package.json`, JSON.stringify({ name, type: 'module', exports: './index.js' })),
      plant(`node_modules/${name}/index.js`, 'export const planted = 1;\n'),
    ]),
    plant('db/round.ts', "import { about } from './about.ts';\nexport const round = () => about;\n"),
    plant('db/about.ts', "import { round } from './round.ts';\nexport const about = () => round;\n"),
  ]);

  const configuration = z
    .object({ rules: z.record(z.string(), z.unknown()) })
    .parse(await new ESLint({ cwd: ROOT }).calculateConfigForFile('server/main.ts'));
  const [severity, table] = ZoneOptions.parse(configuration.rules[TABLE_RULE]);
  expect(severity).toBe(2);
  eslint = new ESLint({
    cwd: tree,
    overrideConfigFile: join(ROOT, 'eslint.config.js'),
    overrideConfig: [
      // The project's own table, held on the planted tree. Without types: the planted files belong to no tsconfig.
      { rules: { [TABLE_RULE]: ['error', { ...table, basePath: tree }] } },
      { files: ['**/*.ts'], languageOptions: { parserOptions: { projectService: false } } },
    ],
    ruleFilter: ({ ruleId }) => ruleId.startsWith('import-x/') || ruleId.startsWith('no-') || ruleId.endsWith('/consistent-type-imports'),
  });
});

afterAll(async () => {
  await rm(tree, { recursive: true, force: true });
});

async function plant(path: string, text: string): Promise<void> {
  await mkdir(dirname(join(tree, path)), { recursive: true });
  await writeFile(join(tree, path), text);
}

/** Rules that a text in a place of the planted tree breaks, one for each report, warnings left out. */
async function brokenRules(place: string, code: string): Promise<(string | null)[]> {
  const results = await eslint.lintText(code, { filePath: join(tree, place, 'breach.ts') });
  return results.flatMap(({ messages }) => messages.filter(({ severity }) => severity === 2).map(({ ruleId }) => ruleId));
}

/** How often the table forbids what is imported in every form that names a module. */
async function reportsOfTheTable(place: string, specifier: string): Promise<number> {
  const forms = [
    `import { planted } from '${specifier}';`,
    `import type { planted as Planted } from '${specifier}';`,
    `export { planted as again } from '${specifier}';`,
    `export type * from '${specifier}';`,
    `export const later = () => import('${specifier}');`,
    'export type There = typeof Planted; export const here = planted;',
  ];
  return (await brokenRules(place, forms.join('\n'))).filter((rule) => rule === TABLE_RULE).length;
}

const FORMS = 5;

function aliasOf(place: string): string {
  return `#${place.replace(/^server\/(domain|contract)$/, '$1')}/planted.ts`;
}

describe.each([...MAY_IMPORT])('%s', (place, allowed) => {
  it.each(PLACES)('from %s, if and only if the table says so', async (target) => {
    const expected = allowed.includes(target) ? 0 : FORMS;

    expect(await reportsOfTheTable(place, aliasOf(target))).toBe(expected);
    expect(await reportsOfTheTable(place, relativeTo(place, `${target}/planted.ts`))).toBe(expected);
  });

  it.each(PACKAGES)('package %s, if and only if the table says so', async (name) => {
    const allowedHere = PACKAGES_ALLOWED.get(place) ?? PACKAGES;

    expect(await reportsOfTheTable(place, name)).toBe(allowedHere.includes(name) ? 0 : FORMS);
  });
});

function relativeTo(place: string, path: string): string {
  const way = relative(place, path).split(sep).join('/');
  return way.startsWith('.') ? way : `./${way}`;
}

describe('around the table', () => {
  it.each(['server/domain', 'server/contract', 'client'])("keeps Node's own modules out of %s", async (place) => {
    expect(await brokenRules(place, "export { readFile } from 'node:fs';")).toContain('import-x/no-nodejs-modules');
  });

  it("leaves Node's own modules to the server", async () => {
    expect(await brokenRules('server/http', "export { readFile } from 'node:fs';")).not.toContain('import-x/no-nodejs-modules');
  });

  it.each([
    ['a type named in passing', "export type Row = import('#db/planted.ts').planted;", '@typescript-eslint/consistent-type-imports'],
    ['a path that is not plain text', 'export const later = () => import(`#db/planted.ts`);', 'no-restricted-syntax'],
    ['files named by a pattern', "export const all = import.meta.glob('../db/*.ts');", 'no-restricted-syntax'],
    ['a module that is not there', "export { planted } from '#db/nowhere.ts';", 'import-x/no-unresolved'],
    ['a path without extension', "export { planted } from './planted';", 'no-restricted-syntax'],
    ['a way round the alias', "export { planted } from '../server/domain/planted.ts';", 'no-restricted-syntax'],
    ['a default export', 'export default 1;', 'import-x/no-default-export'],
  ])('lets nobody slip past by %s', async (_, code, rule) => {
    expect(await brokenRules('client', code)).toContain(rule);
  });

  it('finds a cycle', async () => {
    const [round] = await eslint.lintFiles(join(tree, 'db/round.ts'));

    expect(round?.messages.map(({ ruleId }) => ruleId)).toContain('import-x/no-cycle');
  });

  it('has a row for every source file of the project', async () => {
    const places = [...PLACES, 'server/config.ts', 'server/main.ts', 'server/main-registrar.ts', 'server/local-post.ts'];
    const files = await Promise.all(
      ['server', 'client', 'db', 'fixtures'].map(async (area) =>
        (await readdir(join(ROOT, area), { recursive: true })).filter((path) => /\.tsx?$/.test(path)).map((path) => `${area}/${path}`),
      ),
    );

    const strays = files.flat().filter((path) => !places.some((place) => path === place || path.startsWith(`${place}/`)));
    expect(strays).toEqual([]);
    expect(files.flat().length).toBeGreaterThan(0);
  });
});

describe('what else no product code may do', () => {
  it.each([
    ['server/domain', 'export const now = Date.now();', 'no-restricted-globals'],
    ['server/domain', 'export const now = new Date();', 'no-restricted-globals'],
    ['server/domain', 'export const day = new Date(0);', 'no-restricted-globals'],
    ['server/domain/dates', 'export const now = Date.now();', 'no-restricted-syntax'],
    ['server/domain/dates', 'export const now = new Date();', 'no-restricted-syntax'],
    ['server/domain', 'export const luck = Math.random();', 'no-restricted-properties'],
    ['server/domain', 'const { random } = Math; export const luck = random();', 'no-restricted-properties'],
    ['client', 'export const year = (day: Date) => day.getFullYear();', 'no-restricted-syntax'],
    ['server/services', 'export const port = process.env["PORT"];', 'no-restricted-properties'],
    ['server/services', "import { env } from 'node:process'; export const port = env['PORT'];", 'no-restricted-imports'],
    ['server/services', 'console.log(1);', 'no-console'],
    ['server/services', 'export const find = (text: string) => new RegExp(text);', 'no-restricted-syntax'],
    ['db', 'export const find = (knex, name) => knex.raw(`select ${name}`);', 'no-restricted-syntax'],
    ['db', "export const find = (query, name) => query.whereRaw('name = ' + name);", 'no-restricted-syntax'],
    ['tests', "it.only('alone', () => undefined);", 'no-restricted-syntax'],
    ['client', ['// to', 'do: later'].join(''), 'no-warning-comments'],
  ])('%s: %s', async (place, code, rule) => {
    expect(await brokenRules(place, code)).toContain(rule);
  });

  it.each([
    ['server/domain/dates', 'export const day = new Date(0).getUTCFullYear();'],
    ['db', "export const find = (knex, name) => knex.raw('select ??', [name]);"],
    ['server/services', "export const find = (text: string) => /^[a-z]+$/.test(text);"],
    ['server', 'export const port = process.env["PORT"];'],
  ])('%s may: %s', async (place, code) => {
    const path = place === 'server' ? join(tree, 'server/config.ts') : join(tree, place, 'breach.ts');
    const [result] = await eslint.lintText(code, { filePath: path });

    expect(result?.messages).toEqual([]);
  });
});

describe('the compiler in server/domain', () => {
  const planted = join(ROOT, 'server/domain/planted.ts');

  /** Faults of a text compiled as a file of the domain, under its own tsconfig. */
  function faultsOf(code: string): string[] {
    const folder = dirname(planted);
    const { config } = z.object({ config: z.unknown() }).parse(ts.readConfigFile(join(folder, 'tsconfig.json'), (path) => ts.sys.readFile(path)));
    const { options } = ts.parseJsonConfigFileContent(config, ts.sys, folder);
    const host = ts.createCompilerHost(options);
    const read = host.getSourceFile.bind(host);
    host.getSourceFile = (name, languageVersion, ...rest) =>
      name === planted ? ts.createSourceFile(name, code, languageVersion) : read(name, languageVersion, ...rest);
    const program = ts.createProgram([planted], options, host);
    return program.getSemanticDiagnostics(program.getSourceFile(planted)).map(({ messageText }) => ts.flattenDiagnosticMessageText(messageText, '\n'));
  }

  it('knows neither Node nor a page', () => {
    const names = ['process', 'console', 'document', 'fetch', 'setTimeout', 'Buffer'];

    const faults = faultsOf(names.map((name, index) => `export const planted${index} = ${name};`).join('\n'));

    expect(faults).toHaveLength(names.length);
    for (const [index, name] of names.entries()) expect(faults[index]).toContain(`Cannot find name '${name}'`);
  });

  it('knows the language', () => {
    expect(faultsOf('export const planted = [3, 1, 2].toSorted((a, b) => a - b);')).toEqual([]);
  });
});
