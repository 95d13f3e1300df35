import withNuxt from './.nuxt/eslint.config.mjs'

/**
 * The rooms of the engine from left to right: a room imports only from those to its left.
 * Rooms of one inner list do not know each other.
 */
export const engineRooms = [
  ['materials'],
  ['sections'],
  ['actions'],
  ['statics', 'ec3'],
  ['members'],
  ['sheet'],
  ['plate'],
  ['framing'],
  ['columns'],
  ['quantities'],
  ['selection'],
  ['search'],
  ['verification'],
]

const noPackage = {
  regex: '^(?!#shared/|\\.)',
  message: 'The engine imports no package.',
}
const schemasAsTypesOnly = {
  regex: '^(#shared|(\\.\\./)+)/?schemas/',
  allowTypeImports: true,
  message: 'The engine takes types only from the schemas.',
}
const upwards = {
  regex: '^#shared/(?!engine/|schemas/)',
  message: 'The engine imports from the engine, and types from the schemas.',
}

function engineRoom(room, position) {
  const forbidden = engineRooms.slice(position).flat().filter(name => name !== room)
  return {
    files: [`shared/engine/${room}/**/*.ts`],
    rules: {
      '@typescript-eslint/no-restricted-imports': ['error', {
        patterns: [
          noPackage,
          schemasAsTypesOnly,
          upwards,
          ...(forbidden.length > 0
            ? [{
                regex: `^(#shared/engine|(\\.\\./)+)/?(${forbidden.join('|')})(/|$)`,
                message: `${room} imports only from the rooms to its left.`,
              }]
            : []),
        ],
      }],
    },
  }
}

function arrow(name, files, regex, message) {
  return {
    name: `baywright/${name}`,
    files,
    rules: { '@typescript-eslint/no-restricted-imports': ['error', { patterns: [{ regex, message }] }] },
  }
}

const inside = folders => `^((~~|@@)/|(\\.\\./)+)(${folders})(/|$)`

export default withNuxt(
  {
    name: 'baywright/ignores',
    ignores: ['.data/**', '.output/**', '.nuxt/**', 'public/**'],
  },
  {
    name: 'baywright/strict',
    files: ['**/*.{ts,vue}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': ['error', {
        'ts-ignore': true, 'ts-nocheck': true, 'ts-expect-error': 'allow-with-description',
      }],
      '@typescript-eslint/consistent-type-imports': ['error', { prefer: 'type-imports', disallowTypeAnnotations: false }],
    },
  },
  {
    // Route components are named by Nuxt's files, one word among them.
    name: 'baywright/vue',
    files: ['app/**/*.vue'],
    rules: { 'vue/multi-word-component-names': 'off' },
  },
  {
    name: 'baywright/engine-is-pure',
    files: ['shared/engine/**/*.ts'],
    rules: {
      'no-console': 'error',
      'no-restricted-globals': ['error',
        'process', 'performance', 'fetch', 'setTimeout', 'setInterval', 'crypto', 'window', 'document', 'globalThis'],
      'no-restricted-properties': ['error',
        { object: 'Math', property: 'random', message: 'The engine reads no random.' },
        { object: 'Date', property: 'now', message: 'The engine reads no clock.' }],
      'no-restricted-syntax': ['error',
        { selector: 'NewExpression[callee.name="Date"]', message: 'The engine reads no clock.' }],
    },
  },
  ...engineRooms.flatMap((rooms, position) => rooms.map(room => engineRoom(room, position))),
  arrow('shared', ['shared/{schemas,utils,types,optimise}/**/*.ts'],
    inside('app|server|workers|tests'), 'shared imports only from shared.'),
  arrow('app', ['app/**/*.{ts,vue}'],
    inside('server|workers|tests'), 'app imports from app and shared.'),
  arrow('server', ['server/**/*.ts'],
    inside('app|workers|tests'), 'server imports from server and shared.'),
  arrow('database', ['server/database/**/*.ts'],
    '^(#imports|nitropack|h3|nuxt)|^((~~|@@)/)(app|workers|tests)/|(\\.\\./)+(api|utils|plugins|middleware)/',
    'server/database is free of Nitro: the workers use it too.'),
  arrow('workers', ['workers/**/*.ts'],
    `${inside('app|tests')}|${inside('server/(?!database)')}`, 'workers import from shared and server/database.'),
)
