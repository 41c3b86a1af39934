/**
 * Writes content/specimens/record-vector again: `node --import tsx lib/tools/make-record-vector.ts`.
 * A record that anybody can check their own verifier against: one pulse whose energy is known in closed
 * form, the claim on it, the record signed with a throw-away key, and the public half of that key. The
 * private half is made from a sentence that is printed here, so it can protect nothing.
 */
import { createHash, createPrivateKey, createPublicKey } from 'node:crypto';
import { createReadStream, mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildRecord } from '@/lib/badges/build-record';
import { canonicalJson } from '@/lib/badges/canonical-json';
import { keyIdOf, signRecord } from '@/lib/badges/signature';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { ResultDocument } from '@/lib/pipeline/result';

const FOLDER = path.join(path.dirname(fileURLToPath(import.meta.url)), '..', '..', 'content', 'specimens', 'record-vector');
const KEY_SENTENCE = 'counterfoil record vector: this key is public and protects nothing';

/** E/M = (2/16π) A² √π s (1/(2s²) + ω²) for H22 = A exp(−t²/2s²) exp(−iωt), with its mirror mode. */
const PULSE = { amplitude: 0.3, widthM: 12, omegaPerM: 0.5, fromM: -90, toM: 90, stepM: 0.25 } as const;

function pulseText(): string {
  const { amplitude, widthM, omegaPerM, fromM, toM, stepM } = PULSE;
  const lines = ['# one pulse in the (2,2) mode, closed form; energy known exactly', '# t re22 im22'];
  for (let i = 0; i <= (toM - fromM) / stepM; i++) {
    const t = fromM + i * stepM;
    const height = amplitude * Math.exp(-(t ** 2) / (2 * widthM ** 2));
    lines.push(`${t.toFixed(2)} ${(height * Math.cos(omegaPerM * t)).toFixed(12)} ${(-height * Math.sin(omegaPerM * t)).toFixed(12)}`);
  }
  return `${lines.join('\n')}\n`;
}

const SHEET = {
  format: 'counterfoil-claim/1',
  title: 'Energy of one pulse',
  statement: 'A pulse $H_{22}=A\\,e^{-t^2/2s^2}e^{-i\\omega t}$ and its mirror carry $E/M=\\frac{2}{16\\pi}A^2\\sqrt{\\pi}\\,s\\,(1/2s^2+\\omega^2)$.',
  waveforms: { A: { file: 'pulse.txt', domain: 'time', variable: 'strain', columns: ['t', 're22', 'im22'], timeUnit: 'M', amplitudeUnit: 'rh/M', negativeM: 'mirror' } },
  noise: {},
  claims: [{ id: 'C1', quantity: 'radiated-energy', of: { a: 'A' }, claimed: '0.01931', tolerance: 0.00002 }],
} as const;

/** PKCS #8 wrapping of an Ed25519 seed (RFC 8410). */
function throwAwayKey() {
  const seed = createHash('sha256').update(KEY_SENTENCE).digest();
  return createPrivateKey({ key: Buffer.concat([Buffer.from('302e020100300506032b657004220420', 'hex'), seed]), format: 'der', type: 'pkcs8' });
}

async function compute(): Promise<ResultDocument> {
  const digest = () => {
    const hash = createHash('sha256');
    return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
  };
  const openFile = (name: string) => createReadStream(path.join(FOLDER, name)) as AsyncIterable<Uint8Array>;
  const done = await reproduce({ sheetJson: SHEET, openFile }, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest });
  if (!done.ok) throw new Error(JSON.stringify(done.error));
  return done.value.result;
}

mkdirSync(FOLDER, { recursive: true });
const write = (name: string, text: string): void => writeFileSync(path.join(FOLDER, name), text);
write('pulse.txt', pulseText());
write('claim.json', `${JSON.stringify(SHEET, null, 2)}\n`);
const result = await compute();
const key = throwAwayKey();
const record = buildRecord({
  domain: 'https://counterfoil.example',
  id: '4q7m-2tnd',
  title: SHEET.title,
  authors: ['T. Marrable', 'L. Quennell'],
  revision: 2,
  enteredAt: new Date('2026-11-28T12:00:00Z'),
  decision: { by: 'J. Okonjo-Vale', role: 'editor', on: '2026-11-28', level: 1, remarks: ['digits reduced'], reports: 2 },
  covers: ['C1'],
  result,
  sheet: SHEET,
  files: result.files,
  isDemonstration: false,
  supersedes: null,
  keyId: keyIdOf(key),
});
const canonical = canonicalJson(record);
const signature = signRecord(canonical, key);
write('record.json', canonical);
write('record.sig.json', canonicalJson(signature));
write('signed-record.json', canonicalJson({ format: 'counterfoil-signed-record/1', record, signature }));
write('public-key.pem', createPublicKey(key).export({ type: 'spki', format: 'pem' }).toString());
