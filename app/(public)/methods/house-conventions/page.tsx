import type { Metadata } from 'next';
import { readFile } from 'node:fs/promises';
import Link from 'next/link';
import path from 'node:path';
import { cache } from 'react';
import { parseMethodPage } from '../parse-method-page';
import { ProsePage } from '../prose-page';
import { withValues } from './convention-values';

export const metadata: Metadata = { title: 'House conventions', description: 'Signs, units, constants and rules on which every recomputed number rests.' };

const read = cache(async () => parseMethodPage('house-conventions', withValues(await readFile(path.join(process.cwd(), 'content', 'conventions.md'), 'utf8'))));

export default async function Conventions() {
  const lead = <p className="mt-3 max-w-measure font-serif text-prose">What others may mean by the same words, and what that does to a number, stands in the <Link href="/methods/conventions">catalogue of conventions</Link>.</p>;
  return <ProsePage page={await read()} here="house conventions" lead={lead} />;
}
