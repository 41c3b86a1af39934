import { describe, expect, it } from 'vitest';
import { readHdf5 } from '@/lib/threads/read-hdf5';
import { fixture, inPieces, open, times, wave } from '../formats/array-waves';

const orders = inPieces({ 'o.h5': fixture('orders.h5') });
const far = (a: ArrayLike<number>, b: readonly number[]): number => Math.max(...b.map((x, i) => Math.abs(x - (a[i] ?? Number.NaN))));

describe('big-endian fields of records', () => {
  it('are read as they were stored, whatever of one byte, of text or of the other order stands beside them', async () => {
    const beside = { int8: '20', bool: '21', name: '22', text: '30', little: '31', big: '32', unlike: '33' };
    const datasets = Object.fromEntries(Object.entries(beside).flatMap(([name, mode]) => [[`re${mode}`, `/${name}[re]`], [`im${mode}`, `/${name}[im]`]]));
    const { waveform, problems } = await open({ file: 'o.h5', datasets, time: '/t' }, orders, readHdf5);
    if (waveform?.content.kind !== 'modes') throw new Error(problems.join('\n'));
    const { re, im } = wave(2, 2);
    expect(waveform.content.modes.map((mode) => [`${mode.l}${mode.m}`, far(mode.re, re) < 3e-8, far(mode.im, im) < 3e-8])).toEqual(Object.values(beside).map((mode) => [mode, true, true]));
    expect(waveform.axis).toEqual(times);
  });

  it('are refused by name where it cannot be told how they come', async () => {
    const datasets = { '2,2': '/nested[re]', '3,3': '/list[im]', '4,4': '/enum[re]', '5,5': '/unlike' };
    const { problems } = await open({ file: 'o.h5', datasets, time: '/t' }, orders, readHdf5);
    expect(problems).toEqual([
      expect.stringContaining('o.h5:/nested[re]: saw big-endian numbers in records with a part that cannot be turned beside them (re, im, nested)'),
      expect.stringContaining('o.h5:/list[im]: saw big-endian numbers in records with a part that cannot be turned beside them (re, im, list)'),
      expect.stringContaining('o.h5:/enum[re]: saw big-endian numbers in records with a part that cannot be turned beside them (re, im, enum)'),
      expect.stringContaining('o.h5:/unlike: saw complex numbers whose two parts are stored in unequal orders of bytes (re, im)'),
    ]);
  });
});

const empty = inPieces({ 'e.h5': fixture('empty.h5') });

it('a dataset without samples is refused, as a text without rows is', async () => {
  const { problems } = await open({ file: 'e.h5', datasets: { '2,2': '/none' } }, empty, readHdf5);
  expect(problems).toEqual(['e.h5:/none: saw no samples; expected at least two samples.']);
});

it('attributes anywhere in a file that say whose it is are found when it is read (V29)', async () => {
  const { waveform, findings, problems } = await open({ file: 'w.h5', datasets: { '2,2': '/g/h22' } }, inPieces({ 'w.h5': fixture('whose.h5') }), readHdf5);
  expect([waveform !== null, problems, findings]).toEqual([true, [], ['The attribute "author" of "/" in w.h5 contains the name of an author. So does "note" of "/g". The file is given to referees, and with a record to everybody, as it was attached.']]);
  const silent = await open({ file: 'l.h5', datasets: { '2,2': '/R0100/l2_m2' } }, inPieces({ 'l.h5': fixture('layouts.h5') }), readHdf5);
  expect([silent.waveform !== null, silent.findings]).toEqual([true, []]);
});
