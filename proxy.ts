import { NextResponse, type NextRequest } from 'next/server';

const isDevelopment = process.env.NODE_ENV === 'development';

/**
 * Puts the security headers on every answer. It guards nothing else: who may see or do what is decided in the
 * operations, on the record. Styles may stand inline (positions of the room board and of menus); scripts may not.
 */
export function proxy(request: NextRequest): NextResponse {
  if (request.method === 'TRACE') return new NextResponse(null, { status: 405 });
  const nonce = btoa(crypto.randomUUID());
  const policy = contentSecurityPolicy(nonce);
  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('Content-Security-Policy', policy);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('Content-Security-Policy', policy);
  for (const [name, value] of Object.entries(STEADY_HEADERS)) response.headers.set(name, value);
  return response;
}

const STEADY_HEADERS = {
  'Strict-Transport-Security': 'max-age=63072000; includeSubDomains',
  'X-Content-Type-Options': 'nosniff',
  'Referrer-Policy': 'same-origin',
  'X-Frame-Options': 'DENY',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Permissions-Policy': 'camera=(), geolocation=(), payment=(), microphone=(self), midi=(self)',
};

function contentSecurityPolicy(nonce: string): string {
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDevelopment ? " 'unsafe-eval'" : ''}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self' data:",
    `connect-src 'self'${isDevelopment ? ' ws:' : ''}`,
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}

/** Built files carry no personal data and are served as they are. */
export const config = { matcher: [{ source: '/((?!_next/static/).*)' }] };
