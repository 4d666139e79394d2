import { fileURLToPath } from 'node:url';

/** Where servers of tests keep photos unless the test says otherwise: never where a developer's own are. */
export const TEST_PHOTOS = fileURLToPath(new URL('../../.cache/test-photos', import.meta.url));
