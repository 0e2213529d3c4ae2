'use strict';

const { spawn } = require('node:child_process');
const path = require('node:path');

const ROOT = path.resolve(__dirname, '../..');

/** Runs a command to its end and fails where it fails. */
function run(command, args, options = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, {
      cwd: ROOT,
      stdio: options.quiet ? ['ignore', 'ignore', 'inherit'] : 'inherit',
      ...options,
      env: { ...process.env, ...options.env },
    });
    child.once('error', reject);
    child.once('exit', (code, signal) => {
      if (code === 0) resolve();
      else reject(new Error(`${command} ${args.slice(0, 3).join(' ')} ended with ${signal ?? code}`));
    });
  });
}

/** Runs a TypeScript file of the project with the loader the server's modules need. */
const SCRIPT = ['-r', 'esbuild-register', '--conditions=react-server'];
function runScript(file, env = {}) {
  return run(process.execPath, [...SCRIPT, file], { env });
}

module.exports = { ROOT, SCRIPT, run, runScript };
