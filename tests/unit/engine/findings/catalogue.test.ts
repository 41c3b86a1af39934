import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { findingsCatalogue, parts } from '@/lib/engine/findings/catalogue';

const listed = new Set(findingsCatalogue.map(({ code }) => code));

const sources = ['lib/engine', 'lib/pipeline', 'lib/formats', 'lib/claims'].flatMap((folder) =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts') && !name.startsWith('findings/catalogue'))
    .map((name) => ({ folder, text: readFileSync(join(folder, name), 'utf8') })),
);

/** Codes of the engine are findings wherever they stand; of other rooms those that carry a level. */
const raised = new Set(
  sources.flatMap(({ folder, text }) => {
    const inEngine = folder === 'lib/engine' || folder === 'lib/pipeline' ? [...text.matchAll(/['"](engine\/[a-z0-9-]+)['"]/g)] : [];
    const levelled = [...text.matchAll(/code: ['"]((?:formats|claims)\/[a-z0-9-]+)['"],\s*level:/g)];
    return [...inEngine, ...levelled].map(([, code]) => code!);
  }),
);

describe('the catalogue of findings', () => {
  it('has a row for every code that is raised (add one beside the rule)', () => expect([...raised].filter((code) => !listed.has(code))).toEqual([]));

  it('has no row that nothing raises', () => expect([...listed].filter((code) => !raised.has(code))).toEqual([]));

  it('names each code once, in a part, with a rule and an advice that are sentences', () => {
    expect(listed.size).toBe(findingsCatalogue.length);
    for (const { part, rule, advice, concerns, levels } of findingsCatalogue) {
      expect(Object.keys(parts)).toContain(part);
      expect(rule).toMatch(/^[A-Z|].*\.$/);
      expect(advice).toMatch(/^[A-Z].*\.$/);
      expect(concerns).not.toBe('');
      expect(levels.length).toBeGreaterThan(0);
    }
  });
});
