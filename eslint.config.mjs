import js from '@eslint/js';
import astro from 'eslint-plugin-astro';
import hooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import ts from 'typescript-eslint';

/** Rules that know types run where the types are: TypeScript files of the project. */
const typed = ['src/**/*.{ts,tsx}', 'db/**/*.ts', 'tests/**/*.{ts,tsx}'];

export default ts.config(
  { ignores: ['dist/', 'node_modules/', '.astro/', '.data/', 'fixtures/', 'public/'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  js.configs.recommended,
  ...ts.configs.recommended,
  ...astro.configs['flat/recommended'],
  {
    files: typed,
    extends: [ts.configs.recommendedTypeCheckedOnly],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      '@typescript-eslint/consistent-type-imports': ['error', { disallowTypeAnnotations: false }],
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true },
      ],
    },
  },
  {
    rules: {
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-console': 'error',
      'no-var': 'error',
      'prefer-const': 'error',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrorsIgnorePattern: '^_' },
      ],
      '@typescript-eslint/no-non-null-assertion': 'error',
    },
  },
  {
    // The core is pure: neither clock nor environment nor web nor Node.
    files: ['src/lib/{units,materials,profile,thermal,sensors,logs,review,planning,learning}/**/*.ts'],
    rules: {
      // Loops over numbers index arrays within their bounds.
      '@typescript-eslint/no-non-null-assertion': 'off',
      'no-restricted-globals': [
        'error',
        'process',
        'window',
        'document',
        'fetch',
        'localStorage',
        'Buffer',
        'performance',
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']",
          message: 'The core reads no clock: take the instant as an argument.',
        },
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'The core reads no clock: take the instant as an argument.',
        },
        {
          selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']",
          message: 'The core is deterministic: take the numbers as an argument.',
        },
        {
          selector: 'CallExpression[callee.property.name=/^toLocale/]',
          message: 'The core knows no locale.',
        },
      ],
    },
  },
  {
    files: ['src/**/*.tsx', 'src/lib/client/**/*.ts', 'src/components/islands/**/*.ts'],
    plugins: { 'react-hooks': hooks },
    // The project is not built with React's compiler, whose own rules the plugin carries too.
    rules: {
      'react-hooks/rules-of-hooks': 'error',
      'react-hooks/exhaustive-deps': 'error',
      // Hooks give objects of functions here, not instances of classes.
      '@typescript-eslint/unbound-method': 'off',
    },
  },
  {
    files: ['src/**/*.astro'],
    languageOptions: { globals: { ...globals.browser, Astro: 'readonly' } },
    rules: {
      'astro/no-set-html-directive': 'error',
      'astro/no-unused-define-vars-in-style': 'error',
      // Each of these is how a known advisory of the framework's line is reached.
      'no-restricted-syntax': [
        'error',
        {
          selector: "JSXAttribute[name.namespace.name='define'][name.name.name='vars']",
          message: 'No define:vars.',
        },
        { selector: "JSXAttribute[name.namespace.name='transition']", message: 'No transition directives.' },
        { selector: "JSXAttribute[name.namespace.name='server']", message: 'No server islands.' },
      ],
    },
  },
  {
    files: ['db/**/*.mjs', '*.mjs'],
    languageOptions: { globals: globals.node },
  },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      // Bodies of answers are whatever the server sent; the assertions are the check.
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
    },
  },
  {
    files: ['tests/bench/**', 'db/up/**'],
    rules: { 'no-console': 'off' },
  },
);
