// One lint config. The rules that carry the architecture stand first; style is left to review.
import tseslint from 'typescript-eslint';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';

/** Import direction: schema <- shared <- api, and shared <- web. Nothing imports tests. */
const forbid = (...patterns) => ['error', { patterns: patterns.map(([group, message]) => ({ group, message })) }];
const noTests = [['#tests/*', '**/tests/**'], 'Nothing imports tests.'];
const noApi = [['#api/*', '**/api/modules/**'], 'Only api may import api.'];
const noWeb = [['#web/*', '**/web/src/**'], 'Only web may import web.'];
const noNode = [['node:*', 'fs', 'path', 'crypto', 'os', 'worker_threads'], 'shared/ runs in the browser too.'];

/** Math functions whose last bit differs between engine versions (see DEVELOPERS.md, decision on bit identity). */
const inexactMath = ['sin', 'cos', 'tan', 'asin', 'acos', 'atan', 'atan2', 'exp', 'expm1', 'log', 'log1p', 'log2', 'log10', 'pow', 'cbrt', 'hypot', 'sinh', 'cosh', 'tanh'];
const exactOnly = inexactMath.map((property) => ({ object: 'Math', property, message: 'Not bit-identical between engines: use @stdlib/math-base-special-*.' }));
const noRandom = { object: 'Math', property: 'random', message: 'Use the seeded generator of shared/random.' };

export default tseslint.config(
  // The kernels are AssemblyScript, whose own compiler checks them.
  { ignores: ['node_modules/', 'dist/', '.data/', 'coverage/', 'shared/linalg/wasm/assembly/'] },
  ...tseslint.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'no-restricted-properties': ['error', noRandom],
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  { files: ['shared/**/*.ts'], rules: { 'no-restricted-imports': forbid(noApi, noWeb, noTests, noNode) } },
  { files: ['shared/{method,linalg,random,stats,quantum}/**/*.ts'], rules: { 'no-restricted-properties': ['error', noRandom, ...exactOnly] } },
  { files: ['api/**/*.ts'], rules: { 'no-restricted-imports': forbid(noWeb, noTests) } },
  { files: ['api/cli/**', 'tests/**'], rules: { 'no-console': 'off' } },
  {
    files: ['web/**/*.{ts,tsx}'],
    plugins: { 'jsx-a11y': jsxA11y, 'react-hooks': reactHooks },
    rules: { ...jsxA11y.flatConfigs.recommended.rules, ...reactHooks.configs.recommended.rules, 'no-restricted-imports': forbid(noApi, noTests, noNode) },
  },
);
