/** Limits of what may be sent, beside the schemas that use them; forms, parsers and columns read the same constants. */
export const LIMITS = {
  /** Bytes of a JSON body. A cipher at its own limits, 12 sets of 64 symbols and 200 exceptions, stays well inside. */
  jsonBody: 256 * 1024,
  /** Characters of a mark as typed: 32 glyphs, each at most a bracket of 36 alternatives, and a break after each. */
  mark: 1300,
  serial: 40,
  slug: 120,
  query: 120,
  cursor: 400,
  page: { usual: 25, most: 100 },
  /** Candidates handed to `POST /api/fit`; the decoder never lists more. */
  candidates: 200,
  /** Days of lead a position may name: fifty years. */
  lead: 18_263,
  /** Ciphers listed in one answer; the rest are counted. */
  results: 50,
} as const;
