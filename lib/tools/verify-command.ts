import { createPublicKey, type KeyObject } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { RULES_SENTENCE } from '@/lib/badges/cautions';
import type { RecordDocument } from '@/lib/badges/record';
import { coversLine, LEVEL_MEANINGS } from '@/lib/badges/sentences';
import { decodeText, splitBundle, verifyRecord, type Refusal, type SignedText } from '@/lib/badges/verify-record';
import { keyIdOf } from '@/lib/badges/signature';
import { err, ok, type Result } from '@/lib/kernel/result';
import { compareFiles, type FileComparison } from './verify-files';

/**
 * `npm run verify`: a stranger's check of a record with nothing of ours but the text, the signature
 * and a public key that the stranger holds. No database, no network, no clock.
 */
export interface Console {
  readonly out: (line: string) => void;
  readonly complain: (line: string) => void;
}

const USAGE = `npm run verify -- RECORD --key FILE [--files DIR] [--signature FILE]

RECORD       record.json as downloaded, with its signature beside it (RECORD.sig.json, or
             signature.json in the same folder), or the one file that holds both.
--key        the service's public key (PEM) from a file you hold; never taken from the record.
--files      a folder with the files of the record; each one found is hashed again.
--signature  the signature, where it lies somewhere else.

Exit 0: verified. 1: refused. 2: something could not be read.`;

const EXIT = { verified: 0, refused: 1, unreadable: 2 } as const;

interface Options {
  readonly record: string;
  readonly key: string;
  readonly files: string | undefined;
  readonly signature: string | undefined;
}

export async function runVerify(argv: readonly string[], io: Console): Promise<number> {
  const options = readOptions(argv);
  if (!options) {
    io.complain(USAGE);
    return EXIT.unreadable;
  }
  const key = await readKey(options.key);
  if (!key.ok) return complain(io, key.error);
  const signed = await readSigned(options);
  if (!signed.ok) return complain(io, signed.error);
  const record = verifyRecord(signed.value, key.value);
  if (!record.ok) return complain(io, record.error);
  const files = options.files === undefined ? undefined : await compareFiles(record.value.files, options.files);
  if (files && !files.ok) return complain(io, files.error);
  return tell(io, record.value, keyIdOf(key.value), files?.value);
}

function readOptions(argv: readonly string[]): Options | undefined {
  try {
    const { values, positionals } = parseArgs({
      args: [...argv],
      allowPositionals: true,
      options: { key: { type: 'string' }, files: { type: 'string' }, signature: { type: 'string' } },
    });
    const [record, ...more] = positionals;
    if (record === undefined || more.length > 0 || values.key === undefined) return undefined;
    return { record, key: values.key, files: values.files, signature: values.signature };
  } catch {
    return undefined;
  }
}

const unreadable = (sentence: string): { ok: false; error: Refusal } => ({ ok: false, error: { kind: 'unreadable', code: 'verify/unreadable', sentence } });

async function readBytes(file: string, what: string): Promise<Result<Buffer, Refusal>> {
  try {
    return ok(await readFile(file));
  } catch (error) {
    return unreadable(`${what} ${file} cannot be read: ${(error as NodeJS.ErrnoException).code ?? (error as Error).message}.`);
  }
}

async function readText(file: string, what: string): Promise<Result<string, Refusal>> {
  const bytes = await readBytes(file, what);
  return bytes.ok ? decodeText(bytes.value, `${what} ${path.basename(file)}`) : bytes;
}

async function readKey(file: string): Promise<Result<KeyObject, Refusal>> {
  const pem = await readText(file, 'The key');
  if (!pem.ok) return pem;
  // A private key would work too, and nobody should learn to pass one around.
  if (pem.value.includes('PRIVATE KEY')) return unreadable(`${file} is a private key; expected the public key the service publishes.`);
  try {
    return ok(createPublicKey(pem.value));
  } catch {
    return unreadable(`${file} is no public key in PEM form.`);
  }
}

async function readSigned(options: Options): Promise<Result<SignedText, Refusal>> {
  const record = await readText(options.record, 'The record');
  if (!record.ok) return record;
  const bundle = splitBundle(record.value);
  if (bundle) return bundle;
  const candidates = options.signature === undefined ? besides(options.record) : [options.signature];
  for (const file of candidates) {
    const bytes = await readBytes(file, 'The signature');
    if (!bytes.ok) continue;
    const text = decodeText(bytes.value, `The signature ${path.basename(file)}`);
    return text.ok ? ok({ record: record.value, signature: text.value }) : text;
  }
  // Damage to the one-file form shows here: it no longer says what it is, and nothing lies beside it.
  if (record.value.includes('"signature"')) return err({ kind: 'refused', code: 'verify/damaged', sentence: `${options.record} holds a signature but is no whole signed record: it was changed.` });
  return unreadable(`No signature beside ${options.record}; looked for ${candidates.map((c) => path.basename(c)).join(', ')}.`);
}

function besides(record: string): string[] {
  const folder = path.dirname(record);
  return [`${record}.sig.json`, record.replace(/\.json$/, '.sig.json'), path.join(folder, 'signature.json')].filter((file, i, all) => file !== record && all.indexOf(file) === i);
}

function complain(io: Console, refusal: Refusal): number {
  io.complain(`${refusal.kind === 'refused' ? 'Refused' : 'Unreadable'}: ${refusal.sentence}`);
  return EXIT[refusal.kind];
}

function tell(io: Console, record: RecordDocument, keyId: string, files: readonly FileComparison[] | undefined): number {
  const changed = (files ?? []).filter((f) => f.outcome === 'changed');
  for (const file of changed) io.complain(`Refused: ${file.sentence}`);
  if (changed.length > 0) return EXIT.refused;
  io.out(`Verified: record ${record.id}, revision ${record.revision}, “${record.title}”.`);
  io.out(`  The signature holds under key ${keyId}; the text is in canonical form and unchanged.`);
  io.out(`  Entered ${record.enteredAt} at level ${record.decision.level} by ${record.decision.by} (${record.decision.role}); engine ${record.engine}.`);
  for (const file of (files ?? []).filter((f) => f.outcome === 'same')) io.out(`  ${file.sentence}`);
  io.out('');
  io.out(`What it says: ${LEVEL_MEANINGS[record.decision.level]}`);
  io.out(`  ${coversLine(record)}`);
  for (const line of numberLines(record)) io.out(`  ${line}`);
  io.out('');
  io.out('Not checked here:');
  for (const line of notChecked(record, keyId, files)) io.out(`  - ${line}`);
  io.out('');
  io.out('Cautions:');
  for (const caution of record.cautions) io.out(`  - ${caution.text}`);
  io.out(`  - ${RULES_SENTENCE}`);
  return EXIT.verified;
}

/** Claimed and recomputed side by side, with all the digits that were signed. */
function numberLines(record: RecordDocument): string[] {
  return record.claims.flatMap((claim) =>
    claim.points.map((point) => {
      const at = Object.entries(point.at).map(([name, value]) => ` at ${name} ${value}`).join(',');
      const unit = claim.unit === '' ? '' : ` ${claim.unit}`;
      const recomputed = point.value === null ? 'not computable' : `${point.value}${unit}, U = ${point.expandedUncertainty ?? 'unknown'}`;
      return `${claim.id} ${claim.quantity}${at}: claimed ${point.printed}${unit}, recomputed ${recomputed}: ${point.verdict.replaceAll('-', ' ')}`;
    }),
  );
}

function notChecked(record: RecordDocument, keyId: string, files: readonly FileComparison[] | undefined): string[] {
  const lines = [
    `whether the record has been struck, superseded or has lapsed since: ${record.domain}/records/${record.id} (it lapses ${record.lapsesAt} unless run again)`,
    `whether the key is the service's: compare ${keyId} with what the service publishes`,
    'the computation itself: run npm run reproduce on the claim sheet and the files',
  ];
  if (record.logIndex === null) lines.push('the public log: this record has no entry in it');
  if (!files) return [...lines, `the files: ${record.files.length} are named, no --files was given`];
  return [...lines, ...files.filter((f) => f.outcome === 'missing').map((f) => f.sentence)];
}
