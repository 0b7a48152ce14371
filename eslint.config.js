/** House rules that a machine can hold: types, hooks, accessibility, which way imports point, no texts in components, no clock in the sums. */
import js from '@eslint/js'
import a11y from 'eslint-plugin-jsx-a11y'
import hooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'

const FEATURES = ['advisor', 'catalogue', 'basket', 'checkout', 'account', 'support-desk', 'product-desk']

/** Attributes that a person reads or hears. */
const READ_ATTRIBUTES = new Set([
  'title',
  'alt',
  'placeholder',
  'label',
  'aria-label',
  'aria-description',
  'aria-roledescription',
])
/** The shop's own name is the same in every language. */
const hasLetters = (text) => /\p{L}/u.test(text) && text.trim() !== 'Felloe'
const literalText = (node) => {
  if (node?.type === 'Literal') return typeof node.value === 'string' ? node.value : ''
  if (node?.type === 'TemplateLiteral') return node.quasis.map((quasi) => quasi.value.cooked).join('')
  return ''
}

/** Texts live in locales/: a component holds none. */
const noTextInJsx = {
  meta: {
    type: 'problem',
    messages: { text: 'A text that a person reads belongs in locales/: "{{text}}"' },
    schema: [],
  },
  create(context) {
    const report = (node, text) => {
      if (hasLetters(text)) context.report({ node, messageId: 'text', data: { text: text.trim().slice(0, 40) } })
    }
    return {
      JSXText: (node) => report(node, node.value),
      JSXExpressionContainer(node) {
        const inElement = node.parent.type === 'JSXElement' || node.parent.type === 'JSXFragment'
        if (inElement) report(node, literalText(node.expression))
      },
      JSXAttribute(node) {
        if (node.name.type !== 'JSXIdentifier' || !READ_ATTRIBUTES.has(node.name.name) || !node.value) return
        report(node, literalText(node.value.type === 'JSXExpressionContainer' ? node.value.expression : node.value))
      },
    }
  },
}

/** One entry of no-restricted-imports; `regex` is matched against the path as it is written. */
const imports = (...patterns) => ({
  '@typescript-eslint/no-restricted-imports': [
    'error',
    { patterns: patterns.map(([regex, message]) => ({ regex, message })) },
  ],
})
const notServer = ['(^|/)server/', 'The client takes #contract/… and #core/… from the server, and nothing else.']
const notAbove = (...folders) => [
  `^(\\.\\./)+(${folders.join('|')})/`,
  'Imports point one way: app, pages, features, then ui and lib.',
]

const nodeGlobals = Object.fromEntries(
  [
    'process',
    'console',
    'URL',
    'Buffer',
    'setTimeout',
    'clearTimeout',
    'setInterval',
    'clearInterval',
    'fetch',
    'AbortSignal',
    'AbortController',
  ].map((name) => [name, 'readonly']),
)

export default tseslint.config(
  { ignores: ['dist/', '.data/', 'test-output/', 'node_modules/'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true, allowBoolean: true }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports' }],
      // () => setOpen(true) as a handler is clear enough
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true },
      ],
      // async handlers on JSX attributes are React's own habit; a promise elsewhere where void is expected is a bug
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/unified-signatures': 'off',
      'no-console': 'off',
    },
  },
  {
    files: ['**/*.{js,mjs}'],
    ignores: ['src/**'],
    languageOptions: { globals: nodeGlobals },
    rules: { 'no-unused-vars': ['error', { varsIgnorePattern: '^_' }] },
  },
  {
    files: ['src/public/*.js'],
    languageOptions: {
      sourceType: 'script',
      globals: { localStorage: 'readonly', matchMedia: 'readonly', document: 'readonly' },
    },
  },

  // The sums and the use cases: the time comes in from outside, so that a test or a replay can set it.
  {
    files: ['server/core/**/*.ts', 'server/features/**/*.ts'],
    rules: {
      'no-restricted-syntax': [
        'error',
        {
          selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']",
          message: 'Take the time from deps.clock().',
        },
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'Take the time from deps.clock().',
        },
        {
          selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']",
          message: 'Chance has no place here.',
        },
      ],
    },
  },

  // Which way imports point (the last block that fits a file counts).
  { files: ['server/**/*.ts'], rules: imports(['(^|/)src/', 'The server builds without the client.']) },
  {
    files: ['server/core/**/*.ts'],
    rules: imports([
      '^(?!\\./|\\.\\./(?!\\.\\.|\\w+/)|#core/|zod$|ml-matrix$)',
      'The sums import only sums, zod to check their tables and ml-matrix to solve.',
    ]),
  },
  {
    files: ['server/contract/**/*.ts'],
    rules: imports(['^(?!\\./|#contract/|zod$)', 'A contract imports zod and other contracts only.']),
  },
  {
    files: ['server/features/**/*.ts'],
    rules: imports(
      ['(^|/)src/', 'The server builds without the client.'],
      ['^\\.\\./[^/]+/(routes|webhook)\\.ts$', "Use another feature's service, not its routes."],
    ),
  },
  { files: ['src/**/*.{ts,tsx}'], rules: imports(notServer) },
  { files: ['src/{ui,lib}/**/*.{ts,tsx}'], rules: imports(notServer, notAbove('app', 'pages', 'features')) },
  { files: ['src/pages/**/*.{ts,tsx}'], rules: imports(notServer, notAbove('app')) },
  ...FEATURES.map((feature) => ({
    files: [`src/features/${feature}/**/*.{ts,tsx}`],
    rules: imports(notServer, notAbove('app', 'pages', 'features'), [
      `^(\\.\\./)+(${FEATURES.filter((other) => other !== feature).join('|')})/`,
      'Features do not import each other: a page puts them together, or the part moves to ui or lib.',
    ]),
  })),

  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [hooks.configs.flat.recommended],
    rules: {
      // React Router throws responses and redirects by design
      '@typescript-eslint/only-throw-error': 'off',
    },
  },
  {
    files: ['src/**/*.tsx'],
    extends: [a11y.flatConfigs.recommended],
    plugins: { felloe: { rules: { 'no-text-in-jsx': noTextInJsx } } },
    rules: { 'felloe/no-text-in-jsx': 'error' },
  },
  // supertest and JSON.parse hand out any; a test checks those values, which is its whole purpose
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      '@typescript-eslint/no-non-null-assertion': 'off',
    },
  },
)
