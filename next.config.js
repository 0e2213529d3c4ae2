/** Sent with every answer; the content policy of pages is set per answer in proxy.ts. */
const headers = [
  { key: 'x-content-type-options', value: 'nosniff' },
  { key: 'x-frame-options', value: 'DENY' },
  { key: 'referrer-policy', value: 'same-origin' },
  { key: 'permissions-policy', value: 'camera=(self), microphone=(), geolocation=()' },
  { key: 'cross-origin-opener-policy', value: 'same-origin' },
  ...((process.env.BASE_URL ?? '').startsWith('https:')
    ? [{ key: 'strict-transport-security', value: 'max-age=31536000; includeSubDomains' }]
    : []),
];

/** @type {import('next').NextConfig} */
module.exports = {
  serverExternalPackages: [
    'sequelize',
    'sqlite3',
    'umzug',
    'highs',
    'exceljs',
    'pino',
    'nodemailer',
    'stripe',
  ],
  transpilePackages: [
    '@tanstack/react-table',
    '@tanstack/table-core',
    '@tanstack/react-store',
    '@tanstack/store',
  ],
  typedRoutes: true,
  experimental: { authInterrupts: true },
  devIndicators: false,
  poweredByHeader: false,
  agentRules: false,
  headers: async () => [{ source: '/:path*', headers }],
};
