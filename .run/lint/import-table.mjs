// @ts-check

/**
 * @typedef {object} Area
 * @property {string} name
 * @property {readonly string[]} at its folders and files, from the project's folder
 * @property {readonly string[]} may names of the areas it may import from, itself included
 * @property {readonly string[] | 'any'} packages npm packages it may import
 * @property {boolean} node whether it may import Node's own modules
 * @property {string} why
 */

/** Which way imports may point: a row for each area. Types are no exception, and nothing but tests imports tests. */
/** @type {readonly Area[]} */
export const AREAS = [
  {
    name: 'domain',
    at: ['server/domain'],
    may: ['domain'],
    packages: ['date-fns'],
    node: false,
    why: 'the rules of the trade are pure: given the same arguments they answer the same anywhere, so they import only each other and date-fns',
  },
  {
    name: 'contract',
    at: ['server/contract'],
    may: ['domain', 'contract'],
    packages: ['zod'],
    node: false,
    why: 'server and pages share the contract, so it imports only the domain and zod, which run in both',
  },
  {
    name: 'client',
    at: ['client'],
    may: ['domain', 'contract', 'client'],
    packages: ['@fontsource', '@simplewebauthn/browser', '@tanstack/react-query', '@use-gesture/react', 'react', 'react-dom', 'react-dropzone', 'react-router-dom', 'twgl.js', 'uuid', 'zod'],
    node: false,
    why: 'pages know of the server only what #domain and #contract say; the rest must not reach a browser',
  },
  {
    name: 'db',
    at: ['db'],
    may: ['domain', 'db'],
    packages: 'any',
    node: true,
    why: 'tables don\'t depend on how they are asked for over HTTP, so db imports only the domain',
  },
  {
    name: 'adapters',
    at: ['server/queue', 'server/files', 'server/mail'],
    may: ['domain', 'contract', 'db', 'adapters'],
    packages: 'any',
    node: true,
    why: 'services call queue, files and mail, never the other way round',
  },
  {
    name: 'services',
    at: ['server/services', 'server/policies', 'server/presenters'],
    may: ['domain', 'contract', 'db', 'adapters', 'services'],
    packages: 'any',
    node: true,
    why: 'services, policies and presenters don\'t know who calls them: a request, a job or a script',
  },
  {
    name: 'http',
    at: ['server/http', 'server/auth', 'server/jobs', 'server/config.ts', 'server/main.ts', 'server/main-registrar.ts', 'server/local-post.ts'],
    may: ['domain', 'contract', 'db', 'adapters', 'services', 'http'],
    packages: 'any',
    node: true,
    why: 'the outermost ring of the server imports the rest of it, but neither pages nor fixtures',
  },
  {
    name: 'fixtures',
    at: ['fixtures'],
    may: ['domain', 'contract', 'db', 'fixtures'],
    packages: 'any',
    node: true,
    why: 'fixtures fill the database directly and need no server for it',
  },
];

/** Everything that is not an area: scripts and configuration at the top. */
const NO_AREA = ['.run', 'eslint.config.js', 'vite.config.ts', 'tailwind.config.ts'];

/**
 * The table as options of `import-x/no-restricted-paths`. Each zone forbids the whole project folder, node_modules included,
 * and excepts what the row allows, so that every form of import is held to it: types, re-exports, dynamic ones.
 * @param {string} root the project's folder
 */
export function importTable(root) {
  return {
    basePath: root,
    zones: [
      ...AREAS.map(({ at, may, packages, why }) => ({
        target: [...at],
        from: './',
        except: [...may.flatMap(placesOf), ...(packages === 'any' ? ['node_modules'] : packages.flatMap(packagePlaces))],
        message: `Because ${why}.`,
      })),
      { target: NO_AREA, from: './tests', message: 'Because what runs the project must run without its tests.' },
    ],
  };
}

/** @param {string} name */
function placesOf(name) {
  return AREAS.find((area) => area.name === name)?.at ?? [];
}

/**
 * A package and the types that stand beside it.
 * @param {string} name
 */
function packagePlaces(name) {
  return [`node_modules/${name}`, `node_modules/@types/${name}`];
}
