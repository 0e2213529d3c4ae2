/** @jest-config-loader esbuild-register */
import type { Config } from 'jest';
import nextJest from 'next/jest.js';

const withNext = nextJest({ dir: './' });

const shared = {
  moduleNameMapper: {
    '^@/(.*)$': '<rootDir>/$1',
    '^server-only$': '<rootDir>/__tests__/support/empty.ts',
  },
} satisfies Config;

/** `API_AND_BROWSER=1` adds the suites that need the built server. */
export default async function config(): Promise<Config> {
  const base = await withNext({
    testEnvironment: 'node',
    setupFiles: ['<rootDir>/__tests__/support/setup.ts'],
    ...shared,
  })();
  const served = process.env.WITH_SERVER === '1';
  return {
    ...base,
    testTimeout: served ? 120_000 : 30_000,
    testMatch: served
      ? ['<rootDir>/__tests__/**/*.test.{ts,tsx}']
      : ['<rootDir>/__tests__/unit/**/*.test.{ts,tsx}'],
    testPathIgnorePatterns: ['/node_modules/', '/.next/', '/data/', '/test-output/'],
    modulePathIgnorePatterns: ['<rootDir>/.next/', '<rootDir>/data/', '<rootDir>/test-output/'],
    ...(served
      ? {
          globalSetup: '<rootDir>/__tests__/support/global-setup.ts',
          globalTeardown: '<rootDir>/__tests__/support/global-teardown.ts',
        }
      : {}),
  };
}
