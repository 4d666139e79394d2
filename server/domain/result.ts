/** What a parser answers: the value, or an enumerated fault. Domain code returns faults and never throws on bad input. */
export type Result<Value, Fault> = { readonly ok: true; readonly value: Value } | { readonly ok: false; readonly fault: Fault };

export function succeed<Value>(value: Value): { readonly ok: true; readonly value: Value } {
  return { ok: true, value };
}

export function fail<Fault>(fault: Fault): { readonly ok: false; readonly fault: Fault } {
  return { ok: false, fault };
}
