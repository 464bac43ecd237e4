// Lint rules of the house: types checked everywhere, and the few rules that guard money and borders.
import js from '@eslint/js';
import hooks from 'eslint-plugin-react-hooks';
import ts from 'typescript-eslint';

const NO_MANUAL_COMMIT = {
  selector: 'CallExpression[callee.property.name=/^(commit|rollback)$/]',
  message:
    'Use db.transaction(async (trx) => …): knex hides a refused COMMIT when it is called by hand, and the money would be lost without a word.',
};
const ONLY_CONFIG_READS_ENV = {
  selector: "MemberExpression[object.name='process'][property.name='env']",
  message: 'Read the environment in server/platform/config.ts only.',
};
const NO_DEFAULT_EXPORT = { selector: 'ExportDefaultDeclaration', message: 'Named exports only.' };
const NO_STYLE_ATTRIBUTE = {
  selector: "JSXAttribute[name.name='style']",
  message: 'A style attribute is refused by the content security policy. Use a class.',
};

export default ts.config(
  { ignores: ['dist/**', 'node_modules/**', '.local/**', 'coverage/**'] },
  js.configs.recommended,
  ...ts.configs.recommendedTypeChecked,
  { languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } } },
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/only-throw-error': [
        'error',
        {
          allow: [
            { from: 'lib', name: 'Response' },
            { from: 'package', name: 'Response', package: 'undici-types' },
          ],
        },
      ],
      'no-restricted-syntax': [
        'error',
        NO_MANUAL_COMMIT,
        ONLY_CONFIG_READS_ENV,
        NO_DEFAULT_EXPORT,
        NO_STYLE_ATTRIBUTE,
      ],
    },
  },
  { files: ['**/*.tsx'], ...hooks.configs.flat.recommended },
  {
    files: [
      'server/platform/config.ts',
      'fakes/*/main.ts',
      'seeds/seed.ts',
      'tests/**',
      'vite.config.ts',
      'tailwind.config.ts',
      'knexfile.ts',
      'server/platform/start-up/**',
    ],
    rules: { 'no-restricted-syntax': ['error', NO_MANUAL_COMMIT, NO_STYLE_ATTRIBUTE] },
  },
  {
    // supertest hands a response's body over as `any`; what is expected of it is said in the test itself.
    files: ['tests/**/*.test.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
    },
  },
  {
    files: ['**/*.{js,mjs}'],
    ...ts.configs.disableTypeChecked,
  },
  {
    files: ['**/*.{js,mjs}'],
    languageOptions: {
      globals: {
        process: 'readonly',
        console: 'readonly',
        setTimeout: 'readonly',
        setInterval: 'readonly',
        clearTimeout: 'readonly',
        clearInterval: 'readonly',
        URL: 'readonly',
        Buffer: 'readonly',
        fetch: 'readonly',
        performance: 'readonly',
        AbortSignal: 'readonly',
      },
    },
  },
);
