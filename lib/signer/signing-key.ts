import { createPrivateKey, createPublicKey, type KeyObject } from 'node:crypto';
import { readFileSync, statSync, writeFileSync } from 'node:fs';
import { keyIdOf } from '@/lib/badges/signature';

/**
 * The signer: a process of its own, under a database role of its own, and the only one that can read
 * the key. It takes no requests. It looks for decisions, judges each from the tables and the stored
 * bytes, and signs the record that it has put together itself.
 */
export interface SigningKey {
  readonly id: string;
  readonly privateKey: KeyObject;
  readonly publicPem: string;
}

/** Refuses a key that others on the machine could read, or that is no Ed25519 key. */
export function loadSigningKey(file: string): SigningKey {
  const { mode } = statSync(file);
  if ((mode & 0o077) !== 0) throw new Error(`${file} can be read by others (mode ${(mode & 0o777).toString(8)}); expected 600. Run: chmod 600 ${file}`);
  const privateKey = createPrivateKey(readFileSync(file));
  if (privateKey.asymmetricKeyType !== 'ed25519') throw new Error(`${file} holds a key of the kind ${privateKey.asymmetricKeyType}; expected ed25519.`);
  return { id: keyIdOf(privateKey), privateKey, publicPem: createPublicKey(privateKey).export({ type: 'spki', format: 'pem' }).toString() };
}

/** Beside the private key, for whoever runs this machine to hand out; never a substitute for publishing it. */
export function writePublicKey(privateKeyFile: string, key: SigningKey): string {
  const file = privateKeyFile.replace(/(\.pem)?$/, '.public.pem');
  writeFileSync(file, key.publicPem, { mode: 0o644 });
  return file;
}
