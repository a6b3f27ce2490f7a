import { relative, sep } from 'node:path'
import { fileURLToPath } from 'node:url'
import reactHooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'
import { importFault } from './architecture/arrows.mjs'

const root = fileURLToPath(new URL('..', import.meta.url))

/** The arrows of the architecture, at the import itself. */
const arrowsRule = {
  meta: { type: 'problem', schema: [], messages: { fault: '{{fault}}' } },
  create(context) {
    const file = relative(root, context.filename).split(sep).join('/')
    const check = (node) => {
      const specifier = node.source?.value
      const fault = typeof specifier === 'string' ? importFault(file, specifier) : null
      if (fault !== null) context.report({ node: node.source, messageId: 'fault', data: { fault } })
    }
    return { ImportDeclaration: check, ImportExpression: check, ExportNamedDeclaration: check, ExportAllDeclaration: check }
  },
}

const style = {
  'semi': 'off',
  'eqeqeq': 'error',
  'no-var': 'error',
  'prefer-const': 'error',
  'no-console': 'off',
  'no-eval': 'error',
  'no-implied-eval': 'error',
  'no-param-reassign': ['error', { props: false }],
  'no-restricted-exports': ['error', { restrictDefaultExports: { direct: true, named: true, defaultFrom: true, namedFrom: true, namespaceFrom: true } }],
  'max-len': ['error', { code: 150, ignoreUrls: true, ignoreStrings: true, ignoreTemplateLiterals: true, ignoreRegExpLiterals: true }],
  'max-lines': ['error', { max: 400 }],
  'latchwright/arrows': 'error',
  '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports', prefer: 'type-imports' }],
  '@typescript-eslint/no-explicit-any': 'error',
  '@typescript-eslint/no-non-null-assertion': 'off',
  '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
}

/** Rules that ask the type checker. */
const typed = {
  '@typescript-eslint/no-floating-promises': 'error',
  '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
  '@typescript-eslint/await-thenable': 'error',
  '@typescript-eslint/only-throw-error': 'error',
  '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
  '@typescript-eslint/no-unnecessary-type-assertion': 'error',
  '@typescript-eslint/no-unsafe-assignment': 'error',
  '@typescript-eslint/no-unsafe-return': 'error',
  '@typescript-eslint/no-unsafe-argument': 'error',
}

const pure = {
  'no-restricted-globals': ['error', 'process', 'Buffer', 'window', 'document', 'fetch', 'setTimeout', 'setInterval', 'performance', 'console', 'crypto', 'Date'],
  'no-restricted-properties': ['error', { object: 'Math', property: 'random', message: 'Numbers are counted: the same plan gives the same result.' }],
}

const typeScript = ['**/*.ts', '**/*.tsx']

export default tseslint.config(
  { ignores: ['node_modules/**', 'out/**', 'out-*/**', 'release/**', 'dist/**', 'shots/**', 'test-results/**', 'playwright-report/**'] },
  { plugins: { latchwright: { rules: { arrows: arrowsRule } }, '@typescript-eslint': tseslint.plugin }, linterOptions: { reportUnusedDisableDirectives: 'error' } },
  {
    files: typeScript,
    extends: [tseslint.configs.strict, tseslint.configs.stylistic],
    languageOptions: { parserOptions: { project: fileURLToPath(new URL('../tsconfig.json', import.meta.url)) } },
    rules: { ...style, ...typed, '@typescript-eslint/consistent-type-definitions': 'off', '@typescript-eslint/no-empty-function': 'off', '@typescript-eslint/no-dynamic-delete': 'off' },
  },
  { files: ['**/*.mjs'], rules: { ...style, '@typescript-eslint/consistent-type-imports': 'off' } },
  { files: ['app/**/*.tsx', 'app/**/*.ts'], ...reactHooks.configs.flat['recommended-latest'] },
  { files: ['main/planner/**/*.ts', 'main/contract/**/*.ts'], rules: pure },
  {
    files: ['**/*.config.ts', '**/*.config.mjs', '**/*.worker.ts', '**/*.worker.mjs', '**/global-setup.ts'],
    rules: { 'no-restricted-exports': 'off' },
  },
)
