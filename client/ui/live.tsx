/** Reads `children` out when they change, and shows nothing. */
export function Live({ children }: { readonly children: string }) {
  return (
    <p role="status" aria-live="polite" className="sr-only">
      {children}
    </p>
  );
}
