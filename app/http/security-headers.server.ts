import { randomBytes } from 'node:crypto';
import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';

export interface SecurityHeaderOptions {
  /** Address of the object store, from which the browser loads photographs by signed links. */
  readonly photoOrigin: string;
  /** Address of map tiles as in `MAP_TILE_URL`, or null: then no picture comes from there. */
  readonly tileUrl: string | null;
  /** True when people reach the site over https: then plain http is refused for a year. */
  readonly https: boolean;
  /** Development only: allows the module reloader's socket and its style elements. */
  readonly development: boolean;
}

/** The nonce of this response, set by `securityHeaders`. */
export function nonceOf(response: Response): string {
  const nonce: unknown = response.locals.nonce;
  if (typeof nonce !== 'string') throw new Error('securityHeaders must run before the nonce is read.');
  return nonce;
}

/**
 * Headers of every response: only our own scripts, styles, fonts and connections, pictures from ourselves and the object
 * store, and from a tile server where one is configured; no framing, nothing else from outside.
 */
export function securityHeaders({ photoOrigin, tileUrl, https, development }: SecurityHeaderOptions): RequestHandler[] {
  const protect = helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'", (_request, response) => `'nonce-${nonceIn(response)}'`],
        'style-src': development ? ["'self'", "'unsafe-inline'"] : ["'self'"],
        // Drawings rendered on the server carry computed positions in style attributes.
        'style-src-attr': ["'unsafe-inline'"],
        'img-src': ["'self'", 'data:', 'blob:', photoOrigin, ...(tileUrl === null ? [] : [tileOrigin(tileUrl)])],
        'font-src': ["'self'"],
        'connect-src': development ? ["'self'", 'ws:'] : ["'self'"],
        'worker-src': ["'self'"],
        'manifest-src': ["'self'"],
        'object-src': ["'none'"],
        'base-uri': ["'self'"],
        'form-action': ["'self'"],
        'frame-ancestors': ["'none'"],
        ...(https ? { 'upgrade-insecure-requests': [] } : {}),
      },
    },
    // helmet's own default, no-referrer, turns the Origin of a form post without JavaScript into "null", which the
    // framework's origin check refuses.
    referrerPolicy: { policy: 'strict-origin-when-cross-origin' },
    strictTransportSecurity: https ? { maxAge: 365 * 24 * 60 * 60 } : false,
    xFrameOptions: { action: 'deny' },
  });
  return [giveNonce, protect, limitDeviceAccess];
}

/** `https://*.tiles.example.org` of `https://{s}.tiles.example.org/{z}/{x}/{y}.png`. */
export function tileOrigin(tileUrl: string): string {
  const { protocol, host } = new URL(tileUrl.replace('{s}', 'subdomain-of-tiles'));
  return `${protocol}//${host.replace('subdomain-of-tiles', '*')}`;
}

const giveNonce: RequestHandler = (_request, response, next) => {
  response.locals.nonce = randomBytes(16).toString('base64');
  next();
};

const limitDeviceAccess: RequestHandler = (_request, response, next) => {
  response.setHeader('Permissions-Policy', 'camera=(self), geolocation=(self), microphone=(), payment=(), usb=()');
  next();
};

/** helmet passes Node's response type, although Express's object arrives. */
function nonceIn(response: object): string {
  if (!('locals' in response)) throw new Error('The content security policy needs an Express response.');
  const { locals } = response;
  if (typeof locals !== 'object' || locals === null || !('nonce' in locals)) throw new Error('The response has no nonce.');
  return String(locals.nonce);
}
