import { ContributionPage } from '#contract/contributions.ts';
import type { LoosePayload } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import { blankPayload } from '#client/features/contributions/draft-values.ts';
import type { FactKind } from '#domain/vocabulary.ts';

export const ID = '018d5bbd-2920-72c2-a4c4-26dc0063c791';
export const OTHER_ID = '018d994d-f6c0-759e-9388-3e9cb54a1357';
const AT = '2026-03-04T10:07:31Z';

export const AUTHOR = { id: ID, displayName: 'Harrow Lane' };
export const MODERATOR = { id: OTHER_ID, displayName: 'Anna Wren' };

const MAY_NOT = { edit: false, putForward: false, withdraw: false, discard: false, comment: false, decide: false, seeEvidence: false };

/** A contribution as the register tells of it; checked, so that no test rests on an answer that can't come. */
export function contributionOf(kind: FactKind, change: { readonly can?: Partial<ContributionPage['can']> } & Partial<Omit<ContributionPage, 'can'>> = {}): ContributionPage {
  return ContributionPage.parse({
    id: ID,
    kind,
    title: 'B 5120 of Example Works',
    state: 'drafted',
    subject: null,
    maker: null,
    author: AUTHOR,
    startedAt: AT,
    changedAt: AT,
    putForwardAt: null,
    payload: blankPayload(formOf(kind).fields),
    citations: [],
    note: null,
    revision: 1,
    base: null,
    inForce: null,
    differences: [],
    faults: [],
    names: [],
    sources: [],
    comments: [],
    decisions: [],
    enteredVersion: null,
    openWith: [],
    ...change,
    can: { ...MAY_NOT, ...change.can },
  });
}

/** A payload of each kind that the contract takes, as its author fills the form. */
export const WHOLE: Readonly<Record<FactKind, LoosePayload>> = {
  maker: { name: 'Example Works', place: null, buildsMachines: true, poursIron: false, foundryMark: null, founded: 1901, closed: null, note: null },
  works: { makerId: ID, name: 'North works', place: null, note: null },
  model: { makerId: ID, name: 'No. 3', machineKind: 'lathe', made: { from: '1938-01-01', to: null }, note: null },
  'part-type': { name: 'Headstock', note: null, caution: 'Heavy: lift it with two.' },
  position: { modelId: ID, partTypeId: OTHER_ID, name: 'Headstock', ordinal: 1, weight: 1, lead: { from: 4, to: null }, note: null },
  casting: {
    makerId: ID,
    pouredById: null,
    partTypeId: OTHER_ID,
    number: 'B 5120',
    pattern: null,
    made: null,
    tells: [{ place: 'Rear web', tell: 'Two ribs' }],
    partNumbers: [{ number: '5120-2', note: null }],
    note: null,
  },
  fitment: { positionId: ID, castingId: OTHER_ID, seriesId: null, numbers: { from: null, to: null }, verdict: 'as-built', note: null },
  supersession: { oldId: ID, newId: OTHER_ID, interchange: 'both-ways', note: null },
  series: { modelId: ID, prefix: '', worksId: null, label: null, note: null },
  'serial-range': {
    seriesId: ID,
    accountId: null,
    numbers: { from: '1001', to: null },
    built: { from: '1938-01-01', to: '1938-12-31' },
    precision: 'year',
    meaning: 'built',
    standing: 'solid',
    inOrder: false,
    note: null,
  },
  anchor: { seriesId: ID, number: '1207', built: { from: '1938-08-04', to: '1938-08-04' }, precision: 'day', meaning: 'dispatched', note: null },
  cipher: {
    makerId: ID,
    foundryId: null,
    title: 'Letter and year',
    machineKind: null,
    definition: {
      fields: [
        { field: 'month', symbols: 'months', width: 1 },
        { field: 'year', symbols: 'figures', width: 4 },
      ],
      symbolSets: {
        months: { kind: 'values', symbols: { A: 1, B: 2, C: 3, D: 4, E: 5, F: 6, G: 7, H: 8, J: 9, K: 10, L: 11, M: 12 } },
        figures: { kind: 'digits', symbols: { '0': '0', '1': '1', '2': '2', '3': '3', '4': '4', '5': '5', '6': '6', '7': '7', '8': '8', '9': '9' } },
      },
      usedFrom: '1930-01-01',
      usedTo: '1949-12-31',
    },
    note: null,
  },
  'wear-limit': {
    partTypeId: ID,
    modelId: null,
    measure: 'Bore, front end',
    unit: 'mm',
    asBuilt: { from: 101.6, to: null },
    direction: 'most',
    limit: 101.85,
    method: null,
    note: null,
  },
};

export const SOURCE: LoosePayload = { sourceId: OTHER_ID, newSource: null, field: null, locator: 'page 12', note: null };
