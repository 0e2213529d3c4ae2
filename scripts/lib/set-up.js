'use strict';

const fs = require('node:fs');
const path = require('node:path');
const { ROOT, run } = require('./run.js');
const { hashOf, readStamp, writeStamp } = require('./stamps.js');

const INSTALL_STAMP = 'node_modules/.benchwright-install';
const BUILD_STAMP = '.next/.benchwright-build';
const SOURCES = [
  'app',
  'components',
  'lib',
  'models',
  'migrations',
  'public',
  'fonts',
  'instrumentation.ts',
  'proxy.ts',
  'next.config.js',
  'postcss.config.js',
  'tailwind.config.js',
  'tsconfig.json',
  'package.json',
  'package-lock.json',
];

/** Native modules are compiled against the headers that came with Node.js, where they did. */
function installEnvironment() {
  const prefix = path.resolve(path.dirname(process.execPath), '..');
  const hasHeaders = fs.existsSync(path.join(prefix, 'include/node/node.h'));
  return {
    NODE_ENV: '',
    NEXT_TELEMETRY_DISABLED: '1',
    ...(hasHeaders ? { npm_config_nodedir: prefix } : {}),
  };
}

async function installPackages() {
  const wanted = hashOf(['package-lock.json']);
  if (readStamp(INSTALL_STAMP) === wanted) return;
  console.log('Installing packages (a few minutes the first time) …');
  const npm = process.env.npm_execpath;
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
  if (npm) await run(process.execPath, [npm, ...args], { env: installEnvironment() });
  else await run('npm', args, { env: installEnvironment() });
  writeStamp(INSTALL_STAMP, wanted);
}

async function buildApp() {
  const wanted = hashOf(SOURCES);
  if (readStamp(BUILD_STAMP) === wanted) return;
  console.log('Building …');
  fs.rmSync(path.join(ROOT, BUILD_STAMP), { force: true });
  await run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], {
    env: { NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
  });
  writeStamp(BUILD_STAMP, wanted);
}

/** Debian's browser and PDF tools, which the browser tests use. */
async function installBrowser() {
  const missing = [
    ['/usr/bin/chromium', 'chromium'],
    ['/usr/bin/pdftoppm', 'poppler-utils'],
  ].filter(([file]) => !fs.existsSync(file));
  if (missing.length === 0) return;
  const names = missing.map(([, name]) => name);
  if (process.getuid?.() !== 0 || !fs.existsSync('/usr/bin/apt-get')) {
    throw new Error(
      `The browser tests need ${names.join(' and ')}; install them, or run the tests as root on Debian.`,
    );
  }
  console.log(`Installing ${names.join(' and ')} …`);
  const env = { DEBIAN_FRONTEND: 'noninteractive' };
  await run('apt-get', ['update', '-qq'], { env });
  await run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', ...names], { env, quiet: true });
}

module.exports = { buildApp, installBrowser, installPackages };
