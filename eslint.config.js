import js from '@eslint/js';
import hooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

/** The layers, by pattern: each room names what it may not import. */
const room = (files, ...forbidden) => ({
  files,
  rules: {
    'no-restricted-imports': [
      'error',
      { patterns: forbidden.map(([regex, message]) => ({ regex, message })) },
    ],
  },
});

const SERVER = ['(^|/)server/', 'only the server and its tests import server/'];
const CLIENT = ['(^|/)src/', 'only the client and its tests import src/'];
const ANALYTICS = ['(^|/)analytics(/|$)', 'this room stands on its own'];
const SHARED = ['(^|/)shared/', 'this room stands on its own'];

export default tseslint.config(
  { ignores: ['node_modules', 'dist', '.data', 'coverage', 'test-results', 'drizzle'] },
  js.configs.recommended,
  ...tseslint.configs.strict,
  {
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/no-non-null-assertion': 'error',
      eqeqeq: ['error', 'always'],
    },
  },
  { files: ['src/**'], ...hooks.configs.flat['recommended-latest'] },
  room(['analytics/**'], SERVER, CLIENT, SHARED, ['^(pg|drizzle-orm|express|react)', 'pure functions only']),
  room(['shared/**'], SERVER, CLIENT, ANALYTICS, ['^(?!\\.|zod$)', 'shared imports zod alone']),
  room(['server/**'], CLIENT, ['^\\.\\./[a-z-]+/queries$', 'no resource reaches into another’s queries']),
  room(
    ['src/components/**', 'src/lib/**'],
    SERVER,
    ['(^|/)features/', 'primitives know nothing of features'],
    ['(^|/)pages/', 'primitives know nothing of pages'],
  ),
  room(
    ['src/features/**'],
    SERVER,
    ['(^|/)pages/', 'features know nothing of pages'],
    ['^\\.\\./[a-z-]+/', 'no feature imports another feature'],
  ),
  room(['src/pages/**'], SERVER, ['^\\.\\./[a-z-]+/', 'no page imports another page']),
  {
    files: ['**/*.mjs', '**/*.js'],
    languageOptions: { globals: { process: 'readonly', console: 'readonly', URL: 'readonly' } },
  },
);
