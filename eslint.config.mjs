import angular from 'angular-eslint';
import prettier from 'eslint-config-prettier';
import tseslint from 'typescript-eslint';

export default tseslint.config(
  {
    ignores: [
      'dist/',
      '.data/',
      '.angular/',
      'coverage/',
      'node_modules/',
      'libs/contracts/src/generated/',
      'test-results/',
    ],
  },
  ...tseslint.configs.recommended,
  {
    files: ['**/*.ts'],
    rules: {
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_' },
      ],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      eqeqeq: ['error', 'smart'],
      'no-console': 'error',
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
    },
  },
  { files: ['infra/**', 'test/**'], rules: { 'no-console': 'off' } },
  {
    files: ['apps/web/**/*.ts', 'libs/ui/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/component-selector': [
        'error',
        { type: 'element', prefix: 'tw', style: 'kebab-case' },
      ],
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: 'tw', style: 'camelCase' },
      ],
      '@angular-eslint/component-class-suffix': 'off',
      '@angular-eslint/directive-class-suffix': 'off',
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
    },
  },
  {
    files: ['apps/web/**/*.html', 'libs/ui/**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
    rules: { '@angular-eslint/template/prefer-control-flow': 'error' },
  },
  {
    // What loads before an area, and the area people open on a phone in a hurry: a barrel would pull
    // everything any area uses of it into that first load, because chunks are split along files that
    // are reachable, not along names that are used.
    files: [
      'apps/web/src/app/{core,public,client}/**/*.ts',
      'apps/web/src/app/*.ts',
      'libs/ui/src/**/*.ts',
    ],
    rules: {
      '@typescript-eslint/no-restricted-imports': [
        'error',
        {
          paths: ['@lib/ui', '@lib/domain', '@lib/contracts/web'].map((name) => ({
            name,
            allowTypeImports: true,
            message: `Import from the file itself here: ${name.replace('/web', '')}/...`,
          })),
        },
      ],
    },
  },
  {
    files: ['libs/domain/src/**/*.ts'],
    rules: {
      // Pure computation: no clock, no randomness, no environment (architecture decision 0002).
      'no-restricted-globals': [
        'error',
        'process',
        'setTimeout',
        'setInterval',
        'fetch',
        'window',
        'document',
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now' },
        { object: 'Math', property: 'random' },
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'libs/domain has no clock: take the date as an argument.',
        },
      ],
    },
  },
  { files: ['**/*.{cjs,mjs}'], rules: { '@typescript-eslint/no-require-imports': 'off' } },
  prettier,
);
