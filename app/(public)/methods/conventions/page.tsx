import type { Metadata } from 'next';
import Link from 'next/link';
import { conventionGroups } from '@/lib/explain/conventions/convention';
import { groupTitles } from '@/lib/explain/conventions/conventions';
import { PageContents } from '../page-contents';
import { Trail } from '../trail';
import { GroupTable } from './group-table';

export const metadata: Metadata = { title: 'Conventions', description: 'What else can be meant by the same words, what that does to a number, and how a file shows it.' };

export default function Conventions() {
  return (
    <div className="wrap pt-10">
      <Trail here="conventions" />
      <h1>Conventions</h1>
      <div className="prose mt-3">
        <p>Two groups can mean different things by the same words and get different numbers from the same files. Each row is one such convention: what can be meant, what the other meaning does to a number, how often it is met, and how a file shows it. What this house means stands under <Link href="/methods/house-conventions">house conventions</Link>; a claim that declares its settings leaves less open.</p>
        <p>Where a claim differs, the server looks through these rows for a reading under which it would agree; a row that it does not try says why. A <Link href="/methods/glossary#candidate">candidate</Link> is a hint to people: a number alone cannot say what its authors meant, and several rows give the same factor. Sizes that say what they were measured on are recomputed by the tests on the closed-form signals of the demonstration; the others are the plain factor, or what is usually met.</p>
        <p>Some of it shows in the files themselves. When an author adds a file, its samples, its head or its noise column are held against what stands beside it: which way (2,2) turns, how fast its frequency rises, how large it is beside the post-Newtonian amplitude, how modes of m &lt; 0 mirror their partners, what the head says of masses and spins, and how a noise column compares with the built-in curves in five octaves, or by its size and slope. Each <Link href="/methods/glossary#guess">guess</Link> is told with its reason and a confidence, which is a judgement and no computed probability. Where samples or a noise column speak against a declaration with a confidence of 0.8 or more, the search takes it for evidence and gives its reason beside the candidate. A guess moves no number: the author confirms it, and the word is then declared; or sets it aside, and it stays assumed. Referees see which it was.</p>
        <p>A <b>factor</b> multiplies a number that is there; <b>another run</b> computes it again with other settings; an <b>exchange</b> reads a file or a label as something else.</p>
      </div>
      <div className="mt-4"><PageContents entries={conventionGroups.map((group) => ({ id: group, label: groupTitles[group] }))} across /></div>
      {conventionGroups.map((group) => <GroupTable key={group} group={group} />)}
    </div>
  );
}
