import type { RequestHandler } from 'express';
import helmet from 'helmet';

const ONE_YEAR = 365 * 24 * 60 * 60;

/**
 * Every header said outright, because the library's defaults allow inline styles and framing by the same origin. Nothing inline is
 * allowed; `data:` and `blob:` images are for previews. Strict transport only where visitors come over https.
 */
export function securityHeaders(publicOrigin: string): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        baseUri: ["'none'"],
        objectSrc: ["'none'"],
        frameAncestors: ["'none'"],
        formAction: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
      },
    },
    crossOriginEmbedderPolicy: false,
    crossOriginOpenerPolicy: { policy: 'same-origin' },
    crossOriginResourcePolicy: { policy: 'same-origin' },
    originAgentCluster: true,
    // A page's address may hold what somebody read off their machine, so other sites learn nothing of it.
    referrerPolicy: { policy: 'same-origin' },
    strictTransportSecurity: publicOrigin.startsWith('https:') ? { maxAge: ONE_YEAR, includeSubDomains: true } : false,
    xContentTypeOptions: true,
    xDnsPrefetchControl: { allow: false },
    xDownloadOptions: true,
    xFrameOptions: { action: 'deny' },
    xPermittedCrossDomainPolicies: { permittedPolicies: 'none' },
    xPoweredBy: true,
    xXssProtection: true,
  });
}
