import { defineConfig, globalIgnores } from 'eslint/config';
import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTypeScript from 'eslint-config-next/typescript';
import prettier from 'eslint-config-prettier/flat';

export default defineConfig([
  ...nextVitals,
  ...nextTypeScript,
  prettier,
  globalIgnores(['.next/', '.data/', 'node_modules/', 'next-env.d.ts', 'drizzle/']),
  {
    rules: {
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-console': 'off',
      'no-self-compare': 'error',
      'prefer-const': 'error',
      'no-restricted-imports': [
        'error',
        { paths: [{ name: 'h5wasm/node', message: 'It lets an uploaded file read the host; import plain h5wasm.' }] },
      ],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
    },
  },
  {
    // No components live there; `useDatabase` and its like are ordinary functions.
    ignores: ['app/**', 'tests/unit/ui/**'],
    rules: { 'react-hooks/rules-of-hooks': 'off', '@next/next/no-assign-module-variable': 'off' },
  },
  {
    files: ['**/*.{ts,tsx}'],
    // Sample loops index arrays whose length they just took; their tests do the same.
    ignores: ['lib/engine/**', 'lib/formats/**', 'lib/explain/**', 'lib/pipeline/explain/**', 'tests/{unit/engine,unit/formats,unit/explain,support,golden,properties,convergence,bench}/**'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'error' },
  },
]);
