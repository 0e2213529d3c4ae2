'use strict';

const fs = require('node:fs');
const path = require('node:path');
const { ROOT, run } = require('./run.js');

const RESULTS = 'test-output/jest.json';

/** Types, lint, layout, then every test; the closing line counts what jest itself counted. */
async function testHouse(args) {
  const node = (file, ...rest) =>
    run(process.execPath, [file, ...rest], { env: { NEXT_TELEMETRY_DISABLED: '1' } });
  const failures = [];
  const check = async (name, work) => {
    console.log(`\n— ${name}`);
    await work().catch((error) => {
      failures.push(name);
      console.error(String(error.message ?? error));
    });
  };
  fs.mkdirSync(path.join(ROOT, 'test-output'), { recursive: true });
  fs.rmSync(path.join(ROOT, RESULTS), { force: true });
  if (args.length === 0) {
    await check('types', async () => {
      await node('node_modules/next/dist/bin/next', 'typegen');
      await node('node_modules/typescript/bin/tsc', '--noEmit');
    });
    await check('lint', () => node('node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0'));
    await check('layout', () =>
      node('node_modules/prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.'),
    );
  }
  await check('tests', () =>
    run(
      process.execPath,
      ['node_modules/jest/bin/jest.js', '--json', `--outputFile=${RESULTS}`, '--maxWorkers=2', ...args],
      { env: { WITH_SERVER: '1', NODE_ENV: 'test', NEXT_TELEMETRY_DISABLED: '1' } },
    ),
  );
  const results = fs.existsSync(path.join(ROOT, RESULTS))
    ? JSON.parse(fs.readFileSync(path.join(ROOT, RESULTS), 'utf8'))
    : null;
  if (failures.length > 0) console.error(`\nFailed: ${failures.join(', ')}`);
  if (results)
    console.log(
      `\n${results.numPassedTests} passed, ${results.numFailedTests + results.numRuntimeErrorTestSuites} failed`,
    );
  process.exitCode = failures.length > 0 || !results ? 1 : 0;
}

module.exports = { testHouse };
