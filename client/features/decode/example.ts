import { paths } from '../../lib/paths.ts';
import { NOTHING_SAID, writeDecodeState } from './decode-state.ts';

/** The first thing a visitor can try: a mark, its maker and a machine of the demo county. Offered only where the register has that machine. */
export const EXAMPLE = {
  mark: 'BBOCB',
  maker: 'brackwater-tractor-works',
  model: 'brackwater-30-crawler',
  serial: '3C 1207',
  position: 'cylinder-block',
} as const;

export function exampleAddress(): string {
  return paths.decode(`?${writeDecodeState({ ...NOTHING_SAID, ...EXAMPLE }).toString()}`);
}
