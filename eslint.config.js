import tseslint from 'typescript-eslint';

const only = (property, message) => ({ object: 'process', property, message });
const NO_TERMINAL = [
  only('exit', 'Throw a FairleadError; src/cli/main.ts ends the process.'),
  only('stdout', 'Only src/cli touches the terminal; return text or take an Io.'),
  only('stderr', 'Only src/cli touches the terminal; return text or take an Io.'),
];

export default tseslint.config(
  {
    ignores: ['dist/', 'build/', 'node_modules/', 'coverage/', 'tests/goldens/'],
  },
  {
    linterOptions: { reportUnusedDisableDirectives: 'error', noInlineConfig: true },
    rules: { eqeqeq: 'error' },
  },
  {
    files: ['**/*.js'],
    extends: [tseslint.configs.recommended],
    rules: { 'no-undef': 'error' },
    languageOptions: {
      globals: { process: 'readonly', console: 'readonly', URL: 'readonly', performance: 'readonly' },
    },
  },
  { files: ['templates/report/*.js'], languageOptions: { globals: { document: 'readonly' } } },
  {
    files: ['**/*.ts'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      'max-lines': ['error', 200],
      'no-console': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      // Numbers in messages are the everyday case here.
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      // With noUncheckedIndexedAccess, `samples[i]!` is how an inner loop reads a typed array.
      '@typescript-eslint/no-non-null-assertion': 'off',
      // An interface may be asynchronous although one implementation of it has nothing to wait for.
      '@typescript-eslint/require-await': 'off',
    },
  },
  { files: ['src/*/*-types.ts'], rules: { 'max-lines': 'off' } },
  { files: ['src/**/*.ts'], rules: { 'no-restricted-properties': ['error', ...NO_TERMINAL] } },
  { files: ['src/cli/*.ts'], rules: { 'no-restricted-properties': ['error', NO_TERMINAL[0]] } },
  { files: ['src/cli/main.ts'], rules: { 'no-restricted-properties': 'off' } },
);
