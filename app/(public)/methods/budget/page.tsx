import type { Metadata } from 'next';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { cache } from 'react';
import { parseMethodPage } from '../parse-method-page';
import { ProsePage } from '../prose-page';

export const metadata: Metadata = { title: 'Error budget', description: 'What could have moved a recomputed number, how each part is estimated and how they are combined.' };

const read = cache(async () => parseMethodPage('error budget', await readFile(path.join(process.cwd(), 'content', 'error-budget.md'), 'utf8')));

export default async function ErrorBudget() {
  return <ProsePage page={await read()} here="error budget" />;
}
