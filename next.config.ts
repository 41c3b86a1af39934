import { fileURLToPath } from 'node:url';
import type { NextConfig } from 'next';

/** For every response of every path. The policy for pages, with its nonce, comes from proxy.ts. */
const EVERYWHERE = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  // Not "no-referrer": under that policy browsers send `Origin: null` with our own forms.
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'camera=(), microphone=(), geolocation=(), payment=(), usb=()' },
  ...(process.env['APP_URL']?.startsWith('https:')
    ? [{ key: 'Strict-Transport-Security', value: 'max-age=63072000; includeSubDomains' }]
    : []),
];

const NOWHERE = "frame-ancestors 'none'; base-uri 'none'; form-action 'none'";

/** Files and API answers load nothing, should a browser ever be talked into showing one. */
const NOTHING_LOADS = [{ key: 'Content-Security-Policy', value: `default-src 'none'; ${NOWHERE}` }];

/** A worker lives under the policy of its own script: it may load the rest of its code, and connects to nothing. */
const SCRIPTS_LOAD = [{ key: 'Content-Security-Policy', value: `default-src 'none'; script-src 'self'; ${NOWHERE}` }];

const config: NextConfig = {
  poweredByHeader: false,
  agentRules: false,
  reactStrictMode: true,
  // Tests are type-checked by `npm run check`; a build for a server need not wait for them.
  typescript: { tsconfigPath: 'tsconfig.build.json' },
  serverExternalPackages: ['h5wasm', 'pg', 'piscina', 'graphile-worker', 'pino'],
  turbopack: { root: fileURLToPath(new URL('.', import.meta.url)) },
  experimental: { serverActions: { bodySizeLimit: '1mb' } },
  async rewrites() {
    return [
      { source: '/healthz', destination: '/api/health/live' },
      { source: '/readyz', destination: '/api/health/ready' },
    ];
  },
  async headers() {
    return [
      { source: '/:path*', headers: EVERYWHERE },
      { source: '/api/:path*', headers: NOTHING_LOADS },
      { source: '/_next/:path*', headers: SCRIPTS_LOAD },
      { source: '/(healthz|readyz)', headers: NOTHING_LOADS },
    ];
  },
};

export default config;
