/** A calendar day: whole days since 1970-01-01, negative before it. Never a local-time `Date`. */
export type Day = number;

/** Days `from` to `to`, both included. */
export type DaySpan = { readonly from: Day; readonly to: Day };
