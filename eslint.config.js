import reactHooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'
import { arrows } from './eslint.arrows.js'

const noDefaultExport = {
  selector: 'ExportDefaultDeclaration',
  message: 'Export by name: a name that is the same everywhere can be found.',
}
const noEscapedTest = {
  selector: "MemberExpression[property.name=/^(skip|only|todo|skipIf|runIf)$/][object.name=/^(it|test|describe)$/]",
  message: 'No test is skipped, singled out or left for later.',
}
const impure = [
  { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'shared has no clock: take the time as an argument.' },
  { selector: "MemberExpression[object.name='Date'][property.name='now']", message: 'shared has no clock: take the time as an argument.' },
  { selector: "MemberExpression[object.name='Math'][property.name='random']", message: 'shared has no randomness: take it as an argument.' },
]
const platform = ['window', 'document', 'navigator', 'localStorage', 'indexedDB', 'fetch', 'process', 'performance', 'crypto', 'setTimeout', 'setInterval', 'Buffer']

export default tseslint.config(
  { ignores: ['fixtures/architecture/**', 'dist/**', '.data/**', '.artefacts/**', 'node_modules/**'] },
  ...tseslint.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { arguments: false, attributes: false, properties: false } }],
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
    },
  },
  {
    files: ['**/*.{ts,tsx,js,mjs}'],
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    plugins: { quarterload: arrows },
    rules: {
      'quarterload/arrows': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { disallowTypeAnnotations: false }],
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/ban-ts-comment': ['error', { 'ts-expect-error': true, 'ts-ignore': true, 'ts-nocheck': true }],
      eqeqeq: 'error',
      'max-lines': ['error', { max: 420, skipBlankLines: true }],
      'no-console': 'error',
      'no-restricted-syntax': ['error', noDefaultExport, noEscapedTest],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'] }],
      'prefer-const': 'error',
    },
  },
  {
    files: ['shared/**/*.ts'],
    ignores: ['**/*.test.ts'],
    rules: {
      'no-restricted-globals': ['error', ...platform.map((name) => ({ name, message: 'shared knows no platform: take what it gives as an argument.' }))],
      'no-restricted-syntax': ['error', noDefaultExport, ...impure],
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: { 'react-hooks/rules-of-hooks': 'error', 'react-hooks/exhaustive-deps': 'error' },
  },
  // The tools want a default export here.
  { files: ['*.config.{ts,js}'], rules: { 'no-restricted-syntax': ['error', noEscapedTest] } },
)
