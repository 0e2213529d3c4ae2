'use strict';

/**
 * `npm start`, `npm test`, `npm run dev` and `npm run build` on a machine that has nothing but Node.js: whatever is
 * missing or out of date is set up first. Plain JavaScript, because nothing is installed yet.
 */
const { withLock } = require('./lib/lock.js');
const { buildApp, installBrowser, installPackages } = require('./lib/set-up.js');
const { serveHouse } = require('./lib/serve.js');
const { testHouse } = require('./lib/test.js');

const MODES = {
  start: async () => {
    await withLock(async () => {
      await installPackages();
      await buildApp();
    });
    await serveHouse('start');
  },
  dev: async () => {
    await withLock(installPackages);
    await serveHouse('dev');
  },
  build: () =>
    withLock(async () => {
      await installPackages();
      await buildApp();
    }),
  test: async (args) => {
    await withLock(async () => {
      await installPackages();
      await installBrowser();
      await buildApp();
    });
    await testHouse(args);
  },
};

const [mode = '', ...args] = process.argv.slice(2);
if (!(mode in MODES)) {
  console.error(`Say one of: ${Object.keys(MODES).join(', ')}`);
  process.exitCode = 2;
} else {
  MODES[mode](args).catch((error) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  });
}
