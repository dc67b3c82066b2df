import { defineConfig, globalIgnores } from 'eslint/config'
import nextCoreWebVitals from 'eslint-config-next/core-web-vitals'
import nextTypescript from 'eslint-config-next/typescript'

const layers = ['app', 'db', 'workers', 'fake-sensors', 'tests']

const ban = (files, why, ...regexes) => ({
  files,
  ignores: ['**/*.test.ts', '**/*.test.tsx'],
  rules: {
    'no-restricted-imports': ['error', { patterns: regexes.map((regex) => ({ regex, message: why })) }],
  },
})

const layersBut = (...may) => `(^@/|\\.\\./)(${layers.filter((layer) => !may.includes(layer)).join('|')})/`

// A later entry replaces an earlier one for the same file: general first.
const layering = [
  ban(
    ['lib/**'],
    'lib/ computes; it does no I/O.',
    layersBut(),
    '^(?!\\.|@/|(zod|date-fns|@date-fns/tz)(/|$))',
  ),
  ban(['db/**'], 'db/ may import lib/ only.', layersBut('db')),
  ban(['db/migrations/**'], 'A migration is frozen in time.', '^(?!kysely$)'),
  ban(['workers/**'], 'workers/ may import db/ and lib/.', layersBut('workers', 'db')),
  ban(['fake-sensors/**'], 'Hardware knows MQTT, not our database.', layersBut('fake-sensors')),
  ban(['app/**'], 'Routes reach data through app/_server/.', layersBut('app')),
  ban(['app/_server/**'], '_server/ may import db/ and lib/.', layersBut('app', 'db'), '/_components/'),
  ban(['app/**/_components/**'], 'Components take plain props.', layersBut('app'), '/_server/'),
]

const environmentOnlyInEnv = {
  files: ['**/*.ts', '**/*.tsx', '**/*.mjs'],
  ignores: ['**/env.ts'],
  rules: {
    'no-restricted-properties': [
      'error',
      { object: 'process', property: 'env', message: 'The environment is read only in files named env.ts.' },
    ],
  },
}

const libIsPure = {
  files: ['lib/**/*.ts'],
  ignores: ['lib/**/*.test.ts'],
  rules: {
    'no-restricted-globals': ['error', 'process', 'fetch', 'setTimeout', 'setInterval'],
    'no-restricted-properties': [
      'error',
      { object: 'Date', property: 'now', message: 'Pass the instant in.' },
      { object: 'Math', property: 'random', message: 'Pass the random source in.' },
    ],
    'no-restricted-syntax': [
      'error',
      { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'Pass the instant in.' },
    ],
  },
}

const house = {
  files: ['**/*.ts', '**/*.tsx'],
  rules: {
    '@typescript-eslint/no-explicit-any': 'error',
    '@typescript-eslint/no-non-null-assertion': 'error',
    '@typescript-eslint/ban-ts-comment': 'error',
    '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    'no-empty': ['error', { allowEmptyCatch: false }],
    'no-console': 'error',
    eqeqeq: 'error',
    'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
  },
}

/** A promise that nobody waits for hides its failure: in long-lived processes that is a lost message. */
const noLostPromises = {
  files: ['workers/**/*.ts', 'db/**/*.ts', 'fake-sensors/**/*.ts'],
  languageOptions: { parserOptions: { projectService: true } },
  rules: { '@typescript-eslint/no-floating-promises': 'error' },
}

export default defineConfig([
  globalIgnores(['.next/**', '.lidfast/**', 'coverage/**', 'next-env.d.ts', 'public/**']),
  // Exceptions are argued in this file, not in comments that switch a rule off.
  { linterOptions: { noInlineConfig: true } },
  ...nextCoreWebVitals,
  ...nextTypescript,
  ...layering,
  environmentOnlyInEnv,
  libIsPure,
  house,
  noLostPromises,
])
