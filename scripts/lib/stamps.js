'use strict';

const { createHash } = require('node:crypto');
const fs = require('node:fs');
const path = require('node:path');
const { ROOT } = require('./run.js');

/** Hash of files and folders by content: times are all fresh after a clone. */
function hashOf(entries) {
  const hash = createHash('sha256').update(process.version);
  const visit = (relative) => {
    const full = path.join(ROOT, relative);
    if (!fs.existsSync(full)) return;
    if (fs.statSync(full).isDirectory()) {
      for (const name of fs.readdirSync(full).sort()) visit(path.join(relative, name));
    } else {
      hash.update(relative).update(fs.readFileSync(full));
    }
  };
  entries.forEach(visit);
  return hash.digest('hex');
}

function readStamp(file) {
  try {
    return fs.readFileSync(path.join(ROOT, file), 'utf8');
  } catch {
    return null;
  }
}

function writeStamp(file, value) {
  fs.writeFileSync(path.join(ROOT, file), value);
}

module.exports = { hashOf, readStamp, writeStamp };
