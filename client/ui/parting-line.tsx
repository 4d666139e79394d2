/** Divides sections: a hairline with a small step, as two mould halves that did not quite meet. */
export function PartingLine() {
  return <hr className="parting-line" />;
}
