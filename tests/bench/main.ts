import { benchDecode } from './decode-bench.ts';

/** `npm run bench`: every measurement, as plain tables. Ratios say how many times as long the other way takes. */
await benchDecode();
