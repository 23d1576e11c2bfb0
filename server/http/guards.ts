import type { RequestHandler } from 'express';
import helmet from 'helmet';
import { verifyRequestOrigin } from 'lucia';

import type { Config } from '../config.ts';
import { problems } from './problems.ts';

/** Security headers with a strict content policy: nothing inline, nothing from elsewhere. */
export function securityHeaders(config: Pick<Config, 'secureCookies'>): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        baseUri: ["'none'"],
        connectSrc: ["'self'"],
        fontSrc: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        objectSrc: ["'none'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'"],
        ...(config.secureCookies ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: config.secureCookies ? undefined : false,
    referrerPolicy: { policy: 'same-origin' },
  });
}

const READING_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Refuses every write that does not come from a page of this server or of a configured origin. */
export function requireOwnOrigin(config: Pick<Config, 'publicOrigins'>): RequestHandler {
  return (request, _response, next) => {
    if (READING_METHODS.has(request.method)) {
      next();
      return;
    }
    const { origin, host } = request.headers;
    const allowed = [...(host === undefined ? [] : [host]), ...config.publicOrigins];
    const fromHere = origin !== undefined && allowed.length > 0 && verifyRequestOrigin(origin, allowed);
    next(fromHere ? undefined : problems.forbidden('This write did not come from a page of this server.'));
  };
}
