import { benchDecode } from './decode-bench.ts';
import { benchPhotos } from './photo-bench.ts';
import { benchRecord } from './record-bench.ts';

/**
 * `npm run bench`: every measurement, as plain tables. Ratios say how many times as long the other way takes; names choose some, and a number after
 * a name how much of it: `npm run bench -- photos 12`.
 */
const BENCHES: Readonly<Record<string, (size?: number) => Promise<void>>> = { decode: () => benchDecode(), record: () => benchRecord(), photos: benchPhotos };

const chosen = process.argv.slice(2);
for (const [name, measure] of Object.entries(BENCHES)) {
  if (chosen.length > 0 && !chosen.includes(name)) continue;
  const size = Number(chosen[chosen.indexOf(name) + 1]);
  await measure(...(Number.isInteger(size) && size > 0 ? [size] : []));
}
