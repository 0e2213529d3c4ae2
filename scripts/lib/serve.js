'use strict';

const { spawn } = require('node:child_process');
const net = require('node:net');
const { ROOT, SCRIPT, runScript } = require('./run.js');
const { houseEnvironment } = require('./house-environment.js');

const ANSWER_WITHIN_MS = 60_000;

function isFree(port, host) {
  return new Promise((resolve) => {
    const probe = net.createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, host, () => probe.close(() => resolve(true)));
  });
}

async function answers(address) {
  const until = Date.now() + ANSWER_WITHIN_MS;
  while (Date.now() < until) {
    const response = await fetch(address).catch(() => null);
    if (response?.ok) return true;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  return false;
}

/** Migrates, fills an empty demo house, starts the stand-ins and the server, and stops all of them together. */
async function serveHouse(mode) {
  const { env, port, httpPort, isDemo, hasStandIns } = houseEnvironment();
  const host = env.HOST || '127.0.0.1';
  if (!(await isFree(port, host)))
    throw new Error(`Port ${port} is in use. Stop what listens there, or set PORT.`);
  await runScript('scripts/migrate.ts', env);
  if (isDemo) await runScript('scripts/seed.ts', env);

  const children = [];
  let isStopping = false;
  const stop = (code) => {
    if (isStopping) return;
    isStopping = true;
    process.exitCode = code;
    for (const child of children) child.kill('SIGTERM');
  };
  const start = (args, extra = {}) => {
    const child = spawn(process.execPath, args, {
      cwd: ROOT,
      stdio: 'inherit',
      env: { ...process.env, ...env, ...extra },
    });
    child.once('exit', (code) => stop(isStopping ? (process.exitCode ?? 0) : (code ?? 1)));
    children.push(child);
  };
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => stop(0));

  if (hasStandIns) start([...SCRIPT, 'scripts/stand-ins.ts']);
  const isDevelopment = mode === 'dev';
  start(
    ['node_modules/next/dist/bin/next', isDevelopment ? 'dev' : 'start', '-p', String(port), '-H', host],
    { NODE_ENV: isDevelopment ? 'development' : 'production' },
  );
  if (await answers(`http://${host}:${port}/api/health`)) {
    console.log(`\nBenchwright is at http://localhost:${port}`);
    if (isDemo)
      console.log(
        'Sign in as instructor@, prep@, purchasing@, safety@ or admin@larkmoor.example; the password is DEMO_PASSWORD, or larkmoor-demo.',
      );
    if (hasStandIns) console.log(`Letters it sends are kept at http://localhost:${httpPort}/mail`);
  }
}

module.exports = { serveHouse };
