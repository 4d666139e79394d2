import { PhotoStoreError } from './photo-store.ts';
import type { StoreFault } from './photo-store.ts';

const FAULTS: Readonly<Record<string, StoreFault>> = { ENOENT: 'missing', EISDIR: 'missing', ENOSPC: 'full', EDQUOT: 'full', EFBIG: 'full' };

/** An error of the disk as a fault of the store; any other error as it is. */
export function asDiskFault(error: unknown): unknown {
  if (!(error instanceof Error) || !('syscall' in error) || !('code' in error) || typeof error.code !== 'string') return error;
  return new PhotoStoreError(FAULTS[error.code] ?? 'away', `The disk of the photos failed with ${error.code}`, { cause: error });
}
