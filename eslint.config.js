import svelte from 'eslint-plugin-svelte'
import globals from 'globals'
import ts from 'typescript-eslint'

/** Folders of the core from the lowest layer up: each may import itself and those before it. */
const CORE_LAYERS = [
  'units',
  'project',
  'numerics',
  'components',
  'network',
  'excitation',
  'mounts',
  'runup',
  'absorber',
  'criteria',
  'verdict',
  'feasibility',
  'report',
]
const OUTSIDE_CORE = {
  regex:
    '^(node:|fs$|path$|electron|svelte|better-sqlite3|chart\\.js|three|pdfmake)|/(renderer|electron|test)/',
  message: 'The core is pure: no node, DOM, electron, svelte, drawing library or database.',
}
const restrict = (...patterns) => ({ 'no-restricted-imports': ['error', { patterns }] })

const coreLayer = (name, index) => {
  const higher = CORE_LAYERS.slice(index + 1)
  const upward = {
    regex: `^\\.\\./((${higher.join('|')})/|evaluate)`,
    message: `core/${name} may import only itself and lower layers.`,
  }
  return {
    files: [`core/${name}/**/*.ts`],
    rules: restrict(
      OUTSIDE_CORE,
      higher.length > 0 ? upward : { regex: '^\\.\\./evaluate', message: upward.message },
    ),
  }
}

export default ts.config(
  { ignores: ['out/', 'node_modules/', 'coverage/'] },
  ...ts.configs.strict,
  ...svelte.configs.recommended,
  {
    languageOptions: { globals: { ...globals.browser, ...globals.node } },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      'no-restricted-syntax': [
        'error',
        { selector: 'ExportDefaultDeclaration', message: 'Named exports only.' },
      ],
      eqeqeq: 'error',
      'prefer-const': 'error',
    },
  },
  { files: ['*.config.{js,ts}'], rules: { 'no-restricted-syntax': 'off' } },
  {
    files: ['**/*.svelte', '**/*.svelte.ts'],
    languageOptions: { parserOptions: { parser: ts.parser, extraFileExtensions: ['.svelte'] } },
    // the plugin's rule knows that $props() is always taken apart with `let`
    rules: { 'prefer-const': 'off', 'svelte/prefer-const': 'error' },
  },
  {
    files: ['core/**/*.ts'],
    rules: {
      ...restrict(OUTSIDE_CORE),
      'no-restricted-globals': ['error', 'window', 'document', 'process', 'Buffer', 'fetch', 'localStorage'],
    },
  },
  ...CORE_LAYERS.map(coreLayer),
  {
    files: ['renderer/**/*.{ts,svelte}'],
    rules: restrict(
      {
        regex: '^(node:|electron$|better-sqlite3|pdfmake)',
        message: 'Pages reach the computer through the API only.',
      },
      {
        regex: '/electron/(?!api/(contract|codec|bridge-name)\\.ts$)',
        message: 'Of electron/, pages may import the contract and its codec only.',
      },
    ),
  },
  {
    files: ['electron/**/*.ts'],
    rules: restrict({ regex: '/renderer/|^svelte', message: 'The shell does not know the pages.' }),
  },
  {
    files: ['electron/**/*.ts'],
    ignores: ['electron/library/**'],
    rules: restrict(
      { regex: '/renderer/|^svelte', message: 'The shell does not know the pages.' },
      { regex: '^better-sqlite3', message: 'SQL lives in electron/library/.' },
    ),
  },
)
