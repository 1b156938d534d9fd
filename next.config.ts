import type { NextConfig } from 'next';

/** For every answer. The policy for scripts needs a fresh nonce each time, and is set in proxy.ts. */
const SECURITY_HEADERS = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'camera=(), geolocation=(), microphone=(), payment=(), usb=()' },
];

const config: NextConfig = {
  // Named outright: a lock file in a folder above the clone would be taken for the root of the project.
  turbopack: { root: import.meta.dirname },
  outputFileTracingRoot: import.meta.dirname,
  poweredByHeader: false,
  typedRoutes: true,
  serverExternalPackages: ['pg', 'pg-boss', '@node-rs/argon2', 'nodemailer'],
  // `npm test` checks types once, tests included; the first `npm start` on a machine need not wait for it again.
  typescript: { ignoreBuildErrors: true },
  headers: async () => [{ source: '/:path*', headers: SECURITY_HEADERS }],
};

export default config;
