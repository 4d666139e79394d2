import { Link } from 'react-router-dom';

/** Foot of the margin: which version this is and what changed. */
export function VersionLinks({ version, history }: { readonly version: number; readonly history: string }) {
  return (
    <p className="border-t border-rule pt-3 text-[15px] leading-snug text-slag">
      Version {version}.{' '}
      <Link to={history} className="no-print inline-block py-2">
        What changed
      </Link>
    </p>
  );
}
