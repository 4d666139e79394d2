/** What is wrong with a part of the bench, right under its heading; nothing where nothing is. */
export function FaultNote({ children }: { readonly children: string | null }) {
  return children === null ? null : <p className="mb-2 text-[15px] leading-snug font-semibold text-scale">{children}</p>;
}
