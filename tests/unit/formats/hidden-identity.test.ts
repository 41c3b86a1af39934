import { expect, it } from 'vitest';
import { identityIn } from '@/lib/formats/hidden-identity';

it.each<[string, string | null]>([
  ['Author: A. Nobody', 'the name of an author'],
  ['authors = A. Nobody, B. Nobody', 'the name of an author'],
  ['author-names: Ada Nobody', 'the name of an author'],
  ['created by A. Nobody', 'the name of an author'],
  ['Created_by: Ada Nobody', 'the name of an author'],
  ['written by Ada Nobody on Monday', 'the name of an author'],
  ['host: node12', 'the name of a machine'],
  ['hostname = tarn', 'the name of a machine'],
  ['from /mnt/tank/run7', 'a path of somebody’s machine'],
  ['created by Ninefold 2.1', null],
  ['creator: h5py', null],
  ['written by Oxbow-4', null],
  ['written by hand', null],
  ['the authors thank nobody', null],
  ['host galaxy: none', null],
  ['ratio h/mnt = 2', null],
])('%s', (text, what) => {
  expect(identityIn(text)).toBe(what);
});
