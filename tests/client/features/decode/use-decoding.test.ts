// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { NOTHING_SAID } from '#client/features/decode/decode-state.ts';
import { requestOf } from '#client/features/decode/use-decoding.ts';
import { CipherItem } from '#contract/ciphers.ts';
import { MakerItem } from '#contract/makers.ts';

const MAKER = MakerItem.parse({ id: '018d5bbd-2920-72c2-a4c4-26dc0063c791', slug: 'works', name: 'Works', place: null, buildsMachines: true, poursIron: false, active: { from: null, to: null }, models: 0, castings: 0, ciphers: 1 });
const CIPHER = CipherItem.parse({ id: '018d994d-f6c0-759e-9388-3e9cb54a1357', slug: 'key', title: 'Key', maker: { slug: 'works', name: 'Works' }, foundry: null, kindOfMachine: null, used: { from: null, to: null }, version: 1 });
const SAID = { ...NOTHING_SAID, mark: 'BBOCB' };

describe('requestOf', () => {
  it('tries every cipher where no maker is named', () => {
    expect(requestOf(SAID, null, null)).toEqual({ mark: 'BBOCB', lookAlikes: false });
  });
  it('asks for the maker, or the cipher, by its id', () => {
    expect(requestOf({ ...SAID, maker: 'works' }, [MAKER], null)).toMatchObject({ makerId: MAKER.id });
    expect(requestOf({ ...SAID, maker: 'works', cipher: 'key' }, [MAKER], [CIPHER])).toEqual({ mark: 'BBOCB', lookAlikes: false, cipherId: CIPHER.id });
  });
  it('carries limits and look-alikes', () => {
    expect(requestOf({ ...SAID, lookAlikes: true, fromYear: '1934' }, null, null)).toEqual({ mark: 'BBOCB', lookAlikes: true, limits: { from: '1934-01-01' } });
  });
  it.each([
    ['an empty plate', NOTHING_SAID],
    ['a bracket being filled', { ...SAID, mark: 'B[]CB' }],
    ['no glyph', { ...SAID, mark: 'BBé' }],
    ['a maker not known', { ...SAID, maker: 'nobody' }],
    ['a cipher not known', { ...SAID, maker: 'works', cipher: 'nothing' }],
  ])('asks nothing for %s', (_, said) => {
    expect(requestOf(said, [MAKER], [CIPHER])).toBeNull();
  });
});
