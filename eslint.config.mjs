// @ts-check
import withNuxt from './.nuxt/eslint.config.mjs'

const pureShared = [
  { group: ['vue', 'vue-*', '@vue/*', '@vueuse/*', 'nuxt', 'nuxt/*', '#imports', '#app', '#app/*', 'h3', 'nitropack', 'nitropack/*', 'drizzle-orm', 'drizzle-orm/*', 'better-sqlite3', 'node:*', '#server', '#server/*', '~/*', '@/*', '~~/*'], message: 'shared/ is pure: the same input gives the same output, in browser and server' },
]

export default withNuxt(
  { ignores: ['public/**', 'data/**', 'fixtures/**'] },
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      'vue/no-v-html': 'error',
      'vue/multi-word-component-names': 'off',
      // One line an attribute makes short templates long.
      'vue/max-attributes-per-line': 'off',
      'vue/singleline-html-element-content-newline': 'off',
      'vue/first-attribute-linebreak': 'off',
      '@stylistic/max-statements-per-line': ['error', { max: 2 }],
    },
  },
  {
    // A test that finds undefined where it says there is something fails all the same.
    files: ['tests/**'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  {
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-imports': ['error', { patterns: pureShared }],
      'no-restricted-syntax': [
        'error',
        { selector: 'CallExpression[callee.property.name=/^(toFixed|toPrecision)$/]', message: 'rounding is a named argument: use shared/units' },
        { selector: 'MemberExpression[object.name="Math"][property.name="round"]', message: 'rounding is a named argument: use shared/units' },
        { selector: 'MemberExpression[object.name="Date"][property.name="now"]', message: 'shared/ has no clock' },
      ],
    },
  },
  {
    files: ['server/**/*.ts'],
    rules: { 'no-restricted-imports': ['error', { patterns: [{ group: ['~/*', '@/*', '~~/*', '**/pages/**', '**/components/**', '**/stores/**', '**/composables/**'], message: 'the server never imports the application' }] }] },
  },
  {
    files: ['server/api/**/*.ts'],
    rules: { 'no-restricted-imports': ['error', { patterns: [{ group: ['drizzle-orm', 'drizzle-orm/*', 'better-sqlite3', '**/database/**'], message: 'a handler calls one service' }] }] },
  },
  {
    files: ['pages/**', 'components/**', 'composables/**', 'stores/**', 'utils/**', 'layouts/**', 'middleware/**'],
    rules: { 'no-restricted-imports': ['error', { patterns: [{ group: ['#server', '#server/*', '**/server/**'], message: 'types too: wire shapes live in shared/api' }] }] },
  },
)
