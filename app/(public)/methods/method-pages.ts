import 'server-only';
import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { cache } from 'react';
import { parseMethodPage, type MethodPage } from './parse-method-page';

const folder = path.join(process.cwd(), 'content', 'methods');

export const listMethodPages = cache(async (): Promise<readonly MethodPage[]> => {
  const names = (await readdir(folder)).filter((name) => name.endsWith('.md')).sort();
  return Promise.all(names.map(async (name) => parseMethodPage(name.replace(/\.md$/, ''), await readFile(path.join(folder, name), 'utf8'))));
});

/** Looked up in the list, so that no address can name a file outside it. */
export const findMethodPage = async (id: string): Promise<MethodPage | undefined> => (await listMethodPages()).find((page) => page.id === id);

export const readGlossary = cache(async (): Promise<string> => readFile(path.join(process.cwd(), 'content', 'glossary.md'), 'utf8'));
