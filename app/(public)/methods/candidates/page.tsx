import type { Metadata } from 'next';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { cache } from 'react';
import { parseMethodPage } from '../parse-method-page';
import { ProsePage } from '../prose-page';
import { CalibrationTables, type Calibration } from './calibration-tables';

export const metadata: Metadata = { title: 'Would agree if', description: 'How the server looks for the reading that would close a gap, and how often it errs.' };

const content = (name: string): Promise<string> => readFile(path.join(process.cwd(), 'content', name), 'utf8');
const read = cache(async () => ({ page: parseMethodPage('would agree if', await content('candidates.md')), rates: JSON.parse(await content('explain-calibration.json')) as Calibration }));

export default async function Candidates() {
  const { page, rates } = await read();
  return <ProsePage page={page} here="would agree if" under={{ 'How it was checked': <CalibrationTables {...rates} /> }} />;
}
