import { Navigate } from 'react-router-dom';
import { RegistrarOnly } from '../../features/registrar/registrar-only.tsx';
import { paths } from '../../lib/paths.ts';

/** The registrars' first page is their list of members. */
export function Component() {
  return (
    <RegistrarOnly can="seeMembers">
      <Navigate to={paths.registrarMembers()} replace />
    </RegistrarOnly>
  );
}
