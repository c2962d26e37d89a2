import js from '@eslint/js';
import { createNodeResolver, importX } from 'eslint-plugin-import-x';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';
import { packageDirection, testFiles, zones } from './packages/launcher/rules/import-rules.mjs';

const root = import.meta.dirname;
const typescript = ['**/*.{ts,tsx}'];

/** What a pure package must not know: input, output, clock, chance, platform. */
const platformGlobals = [
  ...['window', 'document', 'navigator', 'process', 'console', 'fetch', 'Buffer', 'Date', 'performance'],
  ...['setTimeout', 'setInterval', 'setImmediate', 'queueMicrotask', 'crypto', 'globalThis', 'global'],
];

export default tseslint.config(
  {
    name: 'not ours',
    ignores: ['**/dist/', '**/.turbo/', '.data/', 'coverage/', 'db/migrations/', 'fixtures/captures/'],
  },
  js.configs.recommended,
  {
    name: 'types',
    files: typescript,
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: root } },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
    },
  },
  {
    name: 'injection reads parameter types at run time, so their imports must stay values',
    files: ['apps/api/**/*.ts'],
    rules: {
      '@typescript-eslint/consistent-type-imports': 'off',
      '@typescript-eslint/no-extraneous-class': 'off',
    },
  },
  {
    name: 'structure',
    files: ['**/*.{ts,tsx,mjs,js}'],
    plugins: { 'import-x': importX },
    settings: {
      'import-x/resolver-next': [
        createNodeResolver({
          extensions: ['.ts', '.tsx', '.mjs', '.js'],
          extensionAlias: { '.js': ['.ts', '.tsx', '.js'] },
        }),
      ],
      'import-x/parsers': { '@typescript-eslint/parser': ['.ts', '.tsx'] },
      'import-x/ignore': ['/node_modules/', '/dist/'],
    },
    rules: {
      'import-x/no-cycle': ['error', { ignoreExternal: true }],
      'import-x/no-relative-packages': 'error',
      'import-x/no-restricted-paths': ['error', { basePath: root, zones: zones(root) }],
      eqeqeq: 'error',
      'no-console': 'off',
    },
  },
  ...packageDirection(),
  {
    name: 'the signal mathematics is pure',
    files: ['packages/{dsp,limits}/src/**/*.ts'],
    ignores: testFiles,
    rules: {
      'no-restricted-globals': ['error', ...platformGlobals],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Results must be repeatable.' },
        { object: 'Date', property: 'now', message: 'Results must be repeatable.' },
      ],
    },
  },
  {
    name: 'one place reads the environment',
    files: ['apps/api/src/**/*.ts'],
    ignores: ['apps/api/src/config/**', 'apps/api/src/{,worker/}main.ts', ...testFiles],
    rules: {
      'no-restricted-properties': [
        'error',
        {
          object: 'process',
          property: 'env',
          message: 'Only src/config reads the environment, handed over by the entry points.',
        },
      ],
    },
  },
  {
    name: 'react',
    files: ['apps/web/**/*.{ts,tsx}'],
    extends: [reactHooks.configs.flat.recommended],
    rules: {
      // Speaks of what the React Compiler would skip; the build does not use it.
      'react-hooks/incompatible-library': 'off',
    },
  },
  {
    name: 'tests',
    files: testFiles,
    rules: {
      // Libraries for requests and mocks answer with any; expectations narrow it.
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/unbound-method': 'off',
    },
  },
  {
    name: 'settings of tools belong to no program whose types could be asked',
    files: ['**/*.config.ts'],
    extends: [tseslint.configs.disableTypeChecked],
  },
  {
    name: 'this file',
    files: ['eslint.config.js'],
    rules: { 'import-x/no-relative-packages': 'off' },
  },
  {
    name: 'scripts that the browser loads as they stand',
    files: ['apps/web/public/**/*.js'],
    languageOptions: {
      globals: Object.fromEntries(
        ['localStorage', 'matchMedia', 'document'].map((name) => [name, 'readonly']),
      ),
    },
  },
  {
    name: 'scripts for Node.js',
    files: ['**/*.{mjs,js}'],
    ignores: ['apps/web/public/**'],
    languageOptions: {
      globals: Object.fromEntries(
        ['process', 'console', 'fetch', 'URL', 'AbortSignal', 'setTimeout', 'clearTimeout'].map((name) => [
          name,
          'readonly',
        ]),
      ),
    },
  },
);
