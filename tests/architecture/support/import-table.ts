/**
 * Who may import whom: the one table. A room that is not named may not be imported; `types` means
 * `import type` only, so that nothing of it exists when the program runs.
 */
export interface Rule {
  readonly values: readonly string[];
  readonly types?: readonly string[];
  /** Packages of others; `*` for any. Node's own modules are `node`. */
  readonly packages: readonly string[];
}

const DOMAIN = ['engine', 'formats', 'claims', 'verdicts', 'explain', 'reviews', 'badges', 'pipeline', 'policy'];

export const TABLE: Readonly<Record<string, Rule>> = {
  kernel: { values: [], packages: [] },
  engine: { values: ['kernel'], packages: ['fft.js', 'decimal.js'] },
  formats: { values: ['kernel'], types: ['engine'], packages: ['h5wasm', '@zip.js/zip.js', 'papaparse'] },
  claims: { values: ['kernel'], types: ['engine'], packages: ['zod'] },
  verdicts: { values: ['kernel', 'claims'], types: ['engine', 'formats'], packages: [] },
  explain: { values: ['kernel', 'claims', 'verdicts'], types: ['engine', 'formats'], packages: [] },
  pipeline: { values: ['kernel', 'formats', 'engine', 'claims', 'verdicts', 'explain'], packages: [] },
  reviews: { values: ['kernel', 'policy'], types: ['claims', 'verdicts', 'pipeline'], packages: [] },
  badges: { values: ['kernel'], types: ['claims', 'verdicts', 'pipeline', 'reviews'], packages: ['node', 'zod', 'canonicalize', 'jose'] },
  policy: { values: ['kernel'], types: DOMAIN, packages: [] },
  db: { values: ['kernel', 'policy'], types: DOMAIN, packages: ['drizzle-orm', 'pg', 'node'] },
  env: { values: [], packages: ['zod'] },
  auth: { values: ['kernel', 'env', 'db', 'policy'], packages: ['*'] },
  jobs: { values: ['kernel', 'env'], types: ['db'], packages: ['*'] },
  storage: { values: ['kernel', 'env'], packages: ['*'] },
  mail: { values: ['kernel', 'env'], packages: ['*'] },
  // A file of strangers is read in a thread of its own, which formats cannot start: it has no platform.
  threads: { values: ['kernel', 'formats'], packages: ['node', 'tsx'] },
  services: { values: ['kernel', 'env', 'db', 'jobs', 'storage', 'mail', 'threads', ...DOMAIN], packages: ['*'] },
  http: { values: ['kernel', 'env', 'auth', 'services', 'policy', 'db'], packages: ['*'] },
  worker: { values: ['kernel', 'env', 'db', 'services', 'jobs', 'storage', 'mail', 'threads', ...DOMAIN], packages: ['*'] },
  signer: { values: ['kernel', 'env', 'db', 'storage', 'badges', 'services'], types: DOMAIN, packages: ['*'] },
  tools: {
    values: ['kernel', 'env', 'db', 'auth', 'jobs', 'storage', 'mail', 'services', 'http', 'worker', 'signer', 'threads', ...DOMAIN],
    packages: ['*'],
  },
  ui: { values: ['kernel'], types: [...DOMAIN, 'services'], packages: ['*'] },
  app: { values: ['kernel', 'env', 'services', 'auth', 'http', 'ui', ...DOMAIN], packages: ['*'] },
};

/** Narrow doors in the table, each with the reason it stands open. */
export const DOORS: readonly { readonly from: string; readonly to: string; readonly why: string }[] = [
  { from: 'db/schema/', to: 'lib/reviews/', why: 'the words a column may hold are the list of the domain, written once' },
  { from: 'db/schema/', to: 'lib/badges/', why: 'the same' },
  { from: 'lib/worker/main', to: 'lib/tools/process', why: 'the manners of a supervised process are written once' },
  { from: 'lib/signer/main', to: 'lib/tools/process', why: 'the same' },
  { from: 'lib/http/read-input', to: 'lib/claims/pointer', why: 'one spelling of a JSON Pointer and of what was seen' },
  { from: 'lib/http/upload-files', to: 'lib/claims/sheet-text', why: 'how long a sheet may be is said once, and a stream is ended there' },
  { from: 'lib/services/accounts/', to: 'lib/auth/', why: 'accounts are the one noun whose verbs the sign-in library half owns' },
];

/** Packages that stay behind a room, whatever the table says. */
export const KEPT: Readonly<Record<string, readonly string[]>> = {
  'pkg:pg': ['db', 'tools', 'worker', 'signer'],
  // The worker speaks to the queue's own tables, which no other role can read.
  'pkg:drizzle-orm': ['db', 'auth', 'jobs', 'tools', 'worker'],
  'pkg:graphile-worker': ['worker', 'jobs', 'tools'],
  'pkg:@aws-sdk/client-s3': ['storage'],
  'pkg:nodemailer': ['mail'],
  'pkg:better-auth': ['auth', 'app', 'ui'],
};

/** Rooms whose result depends on their arguments alone. */
export const PURE = ['kernel', 'engine', 'verdicts', 'explain', 'reviews', 'pipeline'];
