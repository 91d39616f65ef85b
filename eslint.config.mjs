import js from '@eslint/js';
import astro from 'eslint-plugin-astro';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import ts from 'typescript-eslint';

/** Which part may reach which; the message says where the thing belongs instead. */
const border = (files, groups, ignores = []) => ({
  files,
  ignores,
  rules: {
    'no-restricted-imports': ['error', { patterns: groups.map(([group, message]) => ({ group, message })) }],
  },
});

const SERVER_ONLY = [
  ['**/server', '**/server.ts', '~/server/*', '**/src/server/*', '../../server/*', '../../../server/*'],
  'Islands and client.ts run in the browser: ask the API, or move what both need into contract.ts or a rules file.',
];
const DATABASE = [
  ['~/db', '~/db/*', '**/db/*', 'drizzle-orm*'],
  'Only a feature’s server files touch the database.',
];
const LUCIA = [
  ['lucia', '@lucia-auth/*'],
  'Only features/accounts/session.ts imports Lucia, which is retired: one file to change.',
];
const TRANSACTION =
  "CallExpression[callee.property.name='transaction'] > :matches(ArrowFunctionExpression, FunctionExpression) CallExpression[callee.name='database']";

export default ts.config(
  {
    ignores: [
      'dist/',
      '.astro/',
      '.cache/',
      '.data/',
      'coverage/',
      'drizzle/',
      'test-results/',
      'playwright-report/',
    ],
  },
  js.configs.recommended,
  ...ts.configs.recommendedTypeChecked.map((config) => ({ ...config, files: ['**/*.{ts,tsx}'] })),
  ...astro.configs.recommended,
  { languageOptions: { globals: { ...globals.node, ...globals.browser } } },
  {
    files: ['**/*.{ts,tsx}'],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      // `import { type T }` still runs the module: a contract read for its types would bring its schemas to the browser.
      '@typescript-eslint/no-import-type-side-effects': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      // Values from files are written out for messages, whatever they are.
      '@typescript-eslint/no-base-to-string': 'off',
      'no-restricted-syntax': [
        'error',
        {
          selector: TRANSACTION,
          message:
            'Inside a transaction use its tx: the outer database waits for ever on the embedded driver.',
        },
      ],
    },
  },
  {
    files: ['src/**/*.tsx', 'src/features/**/components/**/*.ts', 'src/**/client.ts'],
    ...reactHooks.configs.flat.recommended,
    rules: { ...reactHooks.configs.flat.recommended.rules, 'react-hooks/incompatible-library': 'off' },
  },
  border(
    ['src/kernel/**/*.ts'],
    [
      [
        ['~/*', '**/features/**', '**/server/**', '**/db/**', '**/pages/**'],
        'The kernel imports itself and numeric packages only.',
      ],
      [
        ['astro*', 'react*', 'drizzle-orm*', 'node:*', 'zod'],
        'The kernel knows no framework, no input or output, no clock.',
      ],
    ],
  ),
  border(
    [
      'src/features/**/client.ts',
      'src/features/**/components/**',
      'src/features/**/grid/**',
      'src/components/ui/**',
    ],
    [SERVER_ONLY, DATABASE, LUCIA],
  ),
  {
    files: [
      'src/features/**/{client,address}.ts',
      'src/features/**/{components,grid,globe,store,scene,log}/**',
    ],
    rules: {
      '@typescript-eslint/no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              group: ['**/contract', 'zod'],
              allowTypeImports: true,
              message:
                'Schemas weigh 100 kB in the browser: import types only, and keep constants in a file of their own.',
            },
          ],
        },
      ],
    },
  },
  border(['src/pages/**/*.ts', 'src/features/**/server.ts'], [LUCIA]),
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      // Answers over HTTP are read as whatever they are: the assertions are the check.
      '@typescript-eslint/no-explicit-any': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      '@typescript-eslint/require-await': 'off',
    },
  },
);
