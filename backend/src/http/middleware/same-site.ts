import type { RequestHandler } from 'express';
import { ForbiddenError } from '#backend/domain/errors.ts';

/**
 * Refuses unsafe requests that another site's page has caused. Browsers say where a request comes from
 * (`Sec-Fetch-Site`, older ones `Origin`) and pages cannot change that; on top, each request carries the session's token,
 * which another site cannot read.
 */
export function requireSameSite(publicOrigin: string): RequestHandler {
  return function sameSite(request, _response, next) {
    const site = request.get('Sec-Fetch-Site');
    const origin = request.get('Origin');
    const comesFromElsewhere =
      site === undefined ? origin !== undefined && origin !== publicOrigin : site !== 'same-origin';
    if (comesFromElsewhere) {
      throw new ForbiddenError('cross-site', 'This request was caused by a page of another site.');
    }
    if (!request.control.hasToken(request.get('X-CSRF-Token'))) {
      throw new ForbiddenError(
        'cross-site',
        'The X-CSRF-Token header does not belong to this session. Read the session again.',
      );
    }
    next();
  };
}
