'use strict';

const fs = require('node:fs');
const path = require('node:path');
const { ROOT } = require('./run.js');

const LOCK = path.join(ROOT, '.setup-lock');
const LOOK_AGAIN_MS = 500;

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

/** Lets one copy at a time install or build in this folder. */
async function withLock(work) {
  for (let told = false; ;) {
    try {
      fs.writeFileSync(LOCK, String(process.pid), { flag: 'wx' });
      break;
    } catch {
      const holder = Number(fs.existsSync(LOCK) ? fs.readFileSync(LOCK, 'utf8') : 0);
      if (holder && !isAlive(holder)) fs.rmSync(LOCK, { force: true });
      else if (!told) {
        console.log('Another copy is setting up this folder; waiting for it.');
        told = true;
      }
      await new Promise((resolve) => setTimeout(resolve, LOOK_AGAIN_MS));
    }
  }
  try {
    return await work();
  } finally {
    fs.rmSync(LOCK, { force: true });
  }
}

module.exports = { withLock };
