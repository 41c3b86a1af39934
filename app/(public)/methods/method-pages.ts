import 'server-only';
import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { cache } from 'react';

/** The method pages as written in `content/`: text that is versioned with the code it describes. */
export interface MethodPage {
  readonly id: string;
  readonly title: string;
  /** The sentence under the title. */
  readonly summary: string;
  readonly body: string;
}

const folder = path.join(process.cwd(), 'content', 'methods');

function parsePage(id: string, source: string): MethodPage {
  const [, title = id, rest = source] = /^#\s+(.+?)\s*\n([\s\S]*)$/.exec(source) ?? [];
  const summary = rest.trim().split(/\n\s*\n/)[0] ?? '';
  return { id, title, summary, body: rest.trim() };
}

export const listMethodPages = cache(async (): Promise<readonly MethodPage[]> => {
  const names = (await readdir(folder)).filter((name) => name.endsWith('.md')).sort();
  return Promise.all(names.map(async (name) => parsePage(name.replace(/\.md$/, ''), await readFile(path.join(folder, name), 'utf8'))));
});

/** Looked up in the list, so that no address can name a file outside it. */
export const findMethodPage = async (id: string): Promise<MethodPage | undefined> => (await listMethodPages()).find((page) => page.id === id);

export const readGlossary = cache(async (): Promise<MethodPage> => parsePage('glossary', await readFile(path.join(process.cwd(), 'content', 'glossary.md'), 'utf8')));
