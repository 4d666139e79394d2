import { NavLink } from 'react-router-dom';
import { paths } from '../../lib/paths.ts';

/** The registrars' pages beside each other. */
export function RegistrarLinks() {
  return (
    <span className="flex gap-5">
      <NavLink to={paths.registrarMembers()} className="nav-link">
        Members
      </NavLink>
      <NavLink to={paths.registrarAudit()} className="nav-link">
        Audit trail
      </NavLink>
    </span>
  );
}
