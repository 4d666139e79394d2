import type { UseMutationResult } from '@tanstack/react-query';
import { ActTrouble } from './act-trouble.tsx';
import { sayDeviceFailure } from './passkey-calls.ts';

/** What keeps a passkey from being made or used: the device, or the register. */
export function PasskeyTrouble<Answer, Input>({ act }: { readonly act: UseMutationResult<Answer, Error, Input> }) {
  const ofDevice = act.error === null ? null : sayDeviceFailure(act.error);
  if (ofDevice === null) return <ActTrouble act={act} />;
  return (
    <p role="alert" className="max-w-measure border-l-4 border-scale bg-bed px-4 py-3">
      {ofDevice}
    </p>
  );
}
