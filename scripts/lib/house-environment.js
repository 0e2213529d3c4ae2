'use strict';

const { randomBytes } = require('node:crypto');
const fs = require('node:fs');
const path = require('node:path');
const { ROOT } = require('./run.js');

/** Secrets of a demo house: random, kept beside its data, readable by its owner alone. */
function demoSecrets(dataDir) {
  const file = path.join(dataDir, 'demo-secrets.json');
  fs.mkdirSync(dataDir, { recursive: true });
  if (!fs.existsSync(file)) {
    const secret = () => randomBytes(32).toString('hex');
    fs.writeFileSync(
      file,
      JSON.stringify({
        SESSION_SECRET: secret(),
        STRIPE_WEBHOOK_SECRET: `whsec_${secret()}`,
        STRIPE_SECRET_KEY: `sk_test_${secret()}`,
        SUPPLIER_API_KEY: secret(),
      }),
      { mode: 0o600 },
    );
  }
  return JSON.parse(fs.readFileSync(file, 'utf8'));
}

/**
 * The environment of the app and its stand-ins. What is set outside wins; in a demo the rest points at the
 * stand-ins, whose ports follow the app's.
 */
function houseEnvironment(given = process.env) {
  const port = Number(given.PORT || 3000);
  const dataDir = path.resolve(ROOT, given.DATA_DIR || './data');
  const isDemo = (given.APP_MODE || 'demo') === 'demo';
  const hasStandIns = isDemo && given.STAND_INS !== 'off';
  const httpPort = Number(given.STAND_IN_HTTP_PORT || port + 2);
  const smtpPort = Number(given.SMTP_PORT || port + 1);
  const own = {
    PORT: String(port),
    DATA_DIR: dataDir,
    NEXT_TELEMETRY_DISABLED: '1',
    ...(isDemo ? demoSecrets(dataDir) : {}),
    ...(hasStandIns
      ? {
          SMTP_URL: `smtp://127.0.0.1:${smtpPort}`,
          STRIPE_API_BASE: `http://127.0.0.1:${httpPort}`,
          SUPPLIER_API_BASE: `http://127.0.0.1:${httpPort}`,
          SMTP_PORT: String(smtpPort),
          STAND_IN_HTTP_PORT: String(httpPort),
        }
      : {}),
  };
  const set = Object.fromEntries(
    Object.entries(given).filter(([, value]) => value !== undefined && value !== ''),
  );
  return { env: { ...own, ...set, DATA_DIR: dataDir }, port, httpPort, isDemo, hasStandIns };
}

module.exports = { houseEnvironment };
