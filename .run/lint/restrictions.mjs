// @ts-check
// What a selector can tell and no ready-made rule does. Every message says why.

/** @typedef {{ selector: string, message: string }} Restriction */

const NOT_A_LITERAL = "[arguments.0.type!='Literal']";
const RAW = 'CallExpression:matches([callee.property.name=/raw$/i], [callee.name=/^raw$/])';
const IMPORTING = ':matches(ImportDeclaration, ExportNamedDeclaration, ExportAllDeclaration, ImportExpression)';
const AREA_NAMES = 'domain|contract|client|db|server|services|policies|presenters|queue|files|mail|http|auth|jobs|fixtures|tests';

/** Everywhere. @type {readonly Restriction[]} */
export const IN_ALL = [
  {
    selector: `:matches(NewExpression, CallExpression)[callee.name='RegExp']${NOT_A_LITERAL}`,
    message: 'A pattern put together at run time can be made to run for ever by whoever supplies a part of it: write a literal, or compare text.',
  },
  {
    selector: `${RAW}:matches([arguments.0.type='TemplateLiteral'][arguments.0.expressions.length>0], [arguments.0.type='BinaryExpression'])`,
    message: 'A value in the text of a query is an injection waiting for its day: hand it over as a binding (? or ??).',
  },
  {
    selector: "MemberExpression[property.name='only'][object.name=/^(?:it|test|describe|suite|bench)$/]",
    message: 'This would silence every other test of the file.',
  },
  {
    selector: `${IMPORTING}[source.value=/^[.#](?!.*\\.(?:ts|tsx|mjs|js|json|css)$)/]`,
    message: 'Name the file with its extension, as Node and the browser need it.',
  },
];

/** In all that is shipped, and in the scripts that fill it. @type {readonly Restriction[]} */
export const IN_PRODUCT = [
  {
    selector: "CallExpression[callee.property.name=/^(?:get|set)(?:FullYear|Month|Date|Day|Hours|Minutes)$/]",
    message: 'The answer depends on the time zone of the machine: a calendar day is a number or ISO text here, an instant is read in UTC.',
  },
  {
    selector: "CallExpression[callee.property.name=/^toLocale(?:Date|Time)?String$/][arguments.length<2]",
    message: 'The answer depends on the machine: say the locale and the time zone.',
  },
  {
    selector: "ImportExpression[source.type!='Literal']",
    message: 'The import table can be held only on imports that can be read: write the path as a plain literal.',
  },
  {
    selector: "MemberExpression[object.type='MetaProperty'][property.name=/^glob/]",
    message: 'The import table can be held only on imports that can be read: name each file.',
  },
  {
    selector: `${IMPORTING}[source.value=/^(?:\\.\\.\\u002f)+(?:${AREA_NAMES})\\u002f/]`,
    message: 'From one area to another the path begins with #, so that a reader sees that a border is crossed.',
  },
];

const CLOCK = 'The domain has no clock: take the day as an argument, so that the same question always has the same answer.';

/** In the domain's own calendar, the one place that may use Date. @type {readonly Restriction[]} */
export const IN_DATES = [
  { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: CLOCK },
  { selector: "CallExpression[callee.name='Date']", message: CLOCK },
  { selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']", message: CLOCK },
  { selector: "CallExpression[callee.object.name='Date'][callee.property.name='parse']", message: 'What it answers depends on the machine: use the domain\'s own parser.' },
];

/** For `no-restricted-globals` in the rest of the domain. */
export const NO_DATE = {
  name: 'Date',
  message: 'A Date is an instant and depends on a time zone: a calendar day is a number of days here, and server/domain/dates works on it.',
};

/** For `no-restricted-properties` in the domain. */
export const NO_CHANCE = {
  object: 'Math',
  property: 'random',
  message: 'The domain has no chance: take the random number, or its source, as an argument.',
};

/** For `no-restricted-properties` wherever settings are not read. */
export const NO_ENVIRONMENT = {
  object: 'process',
  property: 'env',
  message: 'Settings are read once, in server/config.ts, where all their faults are listed; take what you need as an argument.',
};

/** For `no-restricted-imports` in the same places. */
export const NO_IMPORTED_ENVIRONMENT = ['process', 'node:process'].map((name) => ({
  name,
  message: 'The global process is the same, and lint sees what is read from it.',
}));
