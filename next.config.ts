import type { NextConfig } from 'next';

/** Headers that hold for every answer; the Content-Security-Policy of pages is set in proxy.ts. */
const everywhere = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Permissions-Policy', value: 'camera=(self), geolocation=(), microphone=()' },
];

const config: NextConfig = {
  // Tests build beside a running application: each keeps its own output.
  distDir: process.env.NEXT_DIST_DIR ?? '.next',
  poweredByHeader: false,
  // `npm run check` checks the types, tests included; a build that starts the product need not do it again.
  typescript: { ignoreBuildErrors: true },
  // Knex asks for drivers that are not installed; the worker and the PDF writer read files of their own at run time.
  serverExternalPackages: ['knex', 'pg', 'graphile-worker', 'pdfkit', '@node-rs/argon2', 'sharp', 'pino'],
  headers: async () => [
    { source: '/:path*', headers: everywhere },
    { source: '/api/:path*', headers: [{ key: 'Cache-Control', value: 'no-store' }] },
    {
      source: '/sw.js',
      headers: [
        { key: 'Cache-Control', value: 'no-cache' },
        { key: 'Service-Worker-Allowed', value: '/' },
      ],
    },
  ],
  // The offline side is one static page; its own small router reads the path.
  rewrites: async () => [{ source: '/field/:path+', destination: '/field' }],
};

export default config;
