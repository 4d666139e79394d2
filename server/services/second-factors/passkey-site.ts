/** What passkeys are made for: the site's host, and the one origin they may be used at. */
export type PasskeySite = { readonly rpId: string; readonly origin: string };

export function passkeySite(publicOrigin: string): PasskeySite {
  return { rpId: new URL(publicOrigin).hostname, origin: publicOrigin };
}
