import { benchDecode } from './decode-bench.ts';
import { benchRecord } from './record-bench.ts';

/** `npm run bench`: every measurement, as plain tables. Ratios say how many times as long the other way takes; names choose some. */
const BENCHES = { decode: benchDecode, record: benchRecord } as const;

const chosen = process.argv.slice(2);
for (const [name, measure] of Object.entries(BENCHES)) {
  if (chosen.length === 0 || chosen.includes(name)) await measure();
}
