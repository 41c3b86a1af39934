import { describe, expect, it } from 'vitest';
import { findingsCatalogue, validationNumbers } from '@/lib/engine/findings/catalogue';
import { fieldSpecimens } from './field-specimens';
import { fileSpecimens } from './file-specimens';
import type { FindingSpecimen } from './finding-specimen';
import { modeSpecimens } from './mode-specimens';
import { recordSpecimens } from './record-specimens';
import { remnantSpecimens } from './remnant-specimens';
import { runSpecimens } from './run-specimens';

/** One table a family; a new rule gets a row in one of them. */
const specimens: readonly FindingSpecimen[] = [...fileSpecimens, ...recordSpecimens, ...modeSpecimens, ...remnantSpecimens, ...runSpecimens, ...fieldSpecimens];

/** It begins like one, or with a name of the sheet such as chi1z, and ends like one. */
const SENTENCE = /^([A-Z(\d]|[a-z]+[A-Z\d]).*[.?]$/s;

describe.each(validationNumbers)('%s', (number) => {
  const own = specimens.filter((specimen) => specimen.number === number);

  it('has data that raise it and data that do not', () => expect(own.length).toBeGreaterThan(0));

  it.each(own)('$code is raised as $level when $when', async ({ code, level, raises, says, silent }) => {
    const found = (await raises()).filter((finding) => finding.code === code);
    const finding = found[0];
    expect(found.map((each) => each.level)).toContain(level);
    for (const words of says) expect(finding!.text).toMatch(words);
    expect(finding!.text).toMatch(SENTENCE);
    expect(`${finding!.text} ${finding!.where}`).toMatch(/\d|\.txt|\btwo\b/i);
    expect(finding!.where).not.toBe('');
    expect(finding!.fix).toMatch(/^[A-Z].*\.$/s);
    expect((await silent()).filter((each) => each.code === code && each.level === level)).toEqual([]);
  });

  it('stands in the catalogue with the levels that it takes', () => {
    for (const { code, level } of own) {
      const row = findingsCatalogue.find((each) => each.code === code);
      expect(row?.numbers).toContain(number);
      expect(row?.levels.map((each) => each.level)).toContain(level);
    }
    expect(findingsCatalogue.some(({ numbers }) => numbers.includes(number))).toBe(true);
  });
});
