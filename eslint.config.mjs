import next from 'eslint-config-next/core-web-vitals';
import typescript from 'eslint-config-next/typescript';

const config = [
  { ignores: ['.next*/**', '.data/**', 'node_modules/**', 'public/**', 'next-env.d.ts', 'test-results/**'] },
  ...next,
  ...typescript,
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': 'error',
      'no-console': ['error', { allow: ['warn', 'error'] }],
      eqeqeq: ['error', 'smart'],
    },
  },
  { files: ['scripts/**', 'tests/**', 'db/seeds/**'], rules: { 'no-console': 'off' } },
  {
    files: ['lib/concrete/**', 'lib/inspection/**'],
    rules: {
      'no-restricted-globals': ['error', 'window', 'document', 'fetch', 'process', 'crypto'],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now' },
        { object: 'Math', property: 'random' },
      ],
      'no-restricted-syntax': ['error', "NewExpression[callee.name='Date'][arguments.length=0]"],
    },
  },
];

export default config;
