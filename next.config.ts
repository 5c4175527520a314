import type { NextConfig } from 'next';

/** Bench builds add the bare handler and the empty page that the product is measured against (`*.bench.ts[x]`). */
const isBench = process.env.FLITCHBOOK_BENCH === '1';

const config: NextConfig = {
  distDir: isBench ? '.data/next-bench' : '.next',
  pageExtensions: isBench ? ['bench.tsx', 'bench.ts', 'tsx', 'ts'] : ['tsx', 'ts'],
  poweredByHeader: false,
  // `npm test` checks the types of everything, tests included; the build need not do a part of it again.
  typescript: { ignoreBuildErrors: true },
  reactStrictMode: true,
  // The optimiser must never see private pictures; sizes are made once, by the photo pipeline.
  images: { unoptimized: true },
  serverExternalPackages: ['temporal-polyfill'],
  headers: () =>
    Promise.resolve([
      {
        source: '/:path*',
        headers: [
          { key: 'X-Content-Type-Options', value: 'nosniff' },
          { key: 'X-Frame-Options', value: 'DENY' },
          { key: 'Referrer-Policy', value: 'no-referrer' },
          { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
          { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
          { key: 'Permissions-Policy', value: 'geolocation=(), microphone=(), payment=(), usb=()' },
          { key: 'Strict-Transport-Security', value: 'max-age=63072000; includeSubDomains' },
        ],
      },
    ]),
};

export default config;
