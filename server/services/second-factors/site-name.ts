/** What authenticators and passkeys call the register. */
export const SITE_NAME = 'Pourbook';
