import { generateKeyPairSync, randomBytes } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { DATA } from './ground.mjs';

const FILE = path.join(DATA, 'secrets.json');
const NAMES = ['admin', 'owner', 'web', 'worker', 'signer', 'session', 'storeKey', 'storeSecret', 'openid'];

/** Secrets of this checkout alone, generated once and readable by its user alone. */
export function secrets() {
  const known = fs.existsSync(FILE) ? JSON.parse(fs.readFileSync(FILE, 'utf8')) : {};
  const missing = NAMES.filter((name) => !known[name]);
  for (const name of missing) known[name] = randomBytes(33).toString('base64url');
  if (missing.length > 0) writePrivately(FILE, JSON.stringify(known, null, 2));
  return known;
}

/** The Ed25519 key that signs the demo's records. Its path is told to the signer process alone. */
export function signingKeyFile() {
  const file = path.join(DATA, 'signing-key.pem');
  if (!fs.existsSync(file)) writePrivately(file, generateKeyPairSync('ed25519').privateKey.export({ type: 'pkcs8', format: 'pem' }));
  return file;
}

/** Written beside and renamed: an interrupted start leaves no half secret. */
function writePrivately(file, text) {
  fs.rmSync(`${file}.part`, { force: true });
  fs.writeFileSync(`${file}.part`, text, { mode: 0o600, flag: 'wx' });
  fs.renameSync(`${file}.part`, file);
}
