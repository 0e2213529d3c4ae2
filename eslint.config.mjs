import { createTypeScriptImportResolver } from 'eslint-import-resolver-typescript';
import { defineConfig, globalIgnores } from 'eslint/config';
import nextVitals from 'eslint-config-next/core-web-vitals';
import importX from 'eslint-plugin-import-x';
import tseslint from 'typescript-eslint';
import { MAY_IMPORT, PURE } from './scripts/lib/layers.mjs';

const layers = Object.keys(MAY_IMPORT);
const zones = layers.map((target) => ({
  target: `./${target}`,
  from: layers
    .filter((layer) => layer !== target && !MAY_IMPORT[target].includes(layer))
    .map((layer) => `./${layer}`),
}));

const clockAndChance = [
  { selector: "NewExpression[callee.name='Date']", message: 'Pure code has no clock.' },
  { selector: "MemberExpression[object.name='Date']", message: 'Pure code has no clock.' },
  {
    selector: "MemberExpression[object.name='Math'][property.name='random']",
    message: 'Pure code has no chance.',
  },
];

/** The pure folders use no package but the ones listed, and nothing of the world outside. */
const pure = Object.entries(PURE).map(([folder, packages]) => ({
  files: [`${folder}/**/*.ts`],
  rules: {
    'no-restricted-globals': [
      'error',
      'process',
      'fetch',
      'setTimeout',
      'setInterval',
      'window',
      'document',
      'console',
    ],
    'no-restricted-syntax': ['error', ...clockAndChance],
    'no-restricted-imports': [
      'error',
      {
        patterns: [
          {
            regex: `^(?!\\.|@/|${packages.length > 0 ? packages.join('|') : '$^'})`,
            message: 'Pure code imports no package.',
          },
        ],
      },
    ],
  },
}));

export default defineConfig([
  globalIgnores([
    '.next/**',
    'node_modules/**',
    'data/**',
    'test-output/**',
    'coverage/**',
    'next-env.d.ts',
    'public/**',
  ]),
  ...nextVitals,
  ...tseslint.configs.recommended,
  {
    plugins: { 'import-x': importX },
    settings: { 'import-x/resolver-next': [createTypeScriptImportResolver({ project: './tsconfig.json' })] },
    rules: {
      'import-x/no-restricted-paths': ['error', { zones }],
      'import-x/no-cycle': ['error', { ignoreExternal: true }],
      'no-console': 'error',
      eqeqeq: ['error', 'always'],
    },
  },
  {
    files: ['**/*.{ts,tsx}'],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'no-restricted-syntax': [
        'error',
        {
          selector: 'ExportDefaultDeclaration',
          message: 'Export by name; Next.js pages and configuration are the exceptions.',
        },
      ],
    },
  },
  {
    files: [
      'app/**/{page,layout,loading,error,not-found,forbidden,template,global-error}.tsx',
      '*.config.{ts,js,mjs}',
      '__tests__/support/global-*.ts',
    ],
    rules: { 'no-restricted-syntax': 'off' },
  },
  {
    files: ['components/ui/**/*.tsx'],
    rules: {
      'import-x/no-restricted-paths': [
        'error',
        { zones: [{ target: './components/ui', from: './components', except: ['./ui'] }] },
      ],
    },
  },
  {
    files: ['scripts/**', 'seeders/**', '__tests__/**'],
    rules: { 'no-console': 'off', 'import-x/no-restricted-paths': 'off' },
  },
  {
    files: ['models/**', 'lib/services/**', 'lib/http/**', 'scripts/**'],
    rules: { 'react-hooks/rules-of-hooks': 'off' },
  },
  { files: ['**/*.js'], rules: { '@typescript-eslint/no-require-imports': 'off' } },
  ...pure,
]);
