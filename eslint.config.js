// The house rules that a machine can hold: who may import whom, where colours and fonts live, what pure code may not do.
const expo = require('eslint-config-expo/flat');
const prettier = require('eslint-config-prettier/flat');

/** A folder that may import only what is listed, and packages. */
const only = (target, allowed, message) => ({
  target,
  from: './',
  except: ['./node_modules', target, ...allowed],
  message,
});

/** A folder that may import anything but what is listed. */
const never = (target, forbidden, message) => forbidden.map((from) => ({ target, from, message }));

const zones = [
  only('./lib/units', [], 'lib/units stands alone.'),
  only('./lib/fit', [], 'lib/fit is pure: numeric packages only.'),
  only('./lib/measure', ['./lib/units', './lib/fit/index.ts'], "lib/measure is pure: units and fit's face."),
  only(
    './lib/plan',
    ['./lib/units', './lib/fit/pooled/published.ts'],
    "lib/plan is pure: units and fit's published part.",
  ),
  only('./lib/contract', ['./lib/units'], 'lib/contract knows units only.'),
  only('./lib/client', ['./lib/contract'], 'lib/client speaks the contract and nothing else.'),
  ...never('./components', ['./server', './app'], 'Components know neither server nor routes.'),
  ...never('./app', ['./server'], 'Routes reach the server through lib/client.'),
  ...never('./server', ['./app', './components', './lib/client'], 'The server knows nothing of the screens.'),
];

const rawColour = 'Colours live in components/theme.css; use color of components/theme.ts.';
const rawFont = 'Fonts live in components/theme.css; use font of components/theme.ts.';

const raw = [
  { selector: 'Literal[value=/^#[0-9a-fA-F]{3,8}$/]', message: rawColour },
  { selector: 'Literal[value=/^(rgb|hsl|oklch|lab)a?[(]/]', message: rawColour },
  { selector: 'Property[key.name="fontFamily"] > Literal', message: rawFont },
  { selector: 'JSXAttribute[name.name="fontFamily"] > Literal', message: rawFont },
];

const drawn = ['victory-native', 'react-native-svg', 'lucide-react-native'].map((name) => ({
  name,
  message: 'Charts are drawn in components/charts, icons in components/ui/Icon.',
}));

module.exports = [
  { ignores: ['dist/**', '.expo/**', '.data/**', '.jest/**', 'public/**', 'node_modules/**'] },
  ...expo,
  prettier,
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      'import/no-cycle': 'error',
      // fast-check is used as fc.property(...), as its own documents do.
      'import/no-named-as-default-member': 'off',
      'import/no-restricted-paths': ['error', { zones, basePath: __dirname }],
      'max-lines': ['error', { max: 300, skipBlankLines: true, skipComments: true }],
    },
  },
  {
    files: ['lib/**/*.{ts,tsx}', 'server/**/*.ts', 'components/**/*.{ts,tsx}'],
    // A worker thread runs its file's default export; a declaration file says what a package exports.
    ignores: ['**/*Worker.ts', '**/*.d.ts'],
    rules: { 'import/no-default-export': 'error' },
  },
  {
    // Pure code gives the same answer to the same question: no clock, no chance, no machine, no screen.
    files: ['lib/{fit,measure,plan,units}/**/*.ts'],
    rules: {
      'no-restricted-imports': [
        'error',
        { patterns: ['node:*', 'react', 'react-native', 'expo*', 'express'] },
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Take a seeded generator as an argument.' },
        { object: 'Date', property: 'now', message: 'Take the time as an argument.' },
      ],
    },
  },
  {
    files: ['server/**/*.ts'],
    ignores: ['server/config.ts'],
    rules: {
      'no-restricted-properties': [
        'error',
        { object: 'process', property: 'env', message: 'Only server/config.ts reads the environment.' },
      ],
    },
  },
  {
    files: ['app/**/*.{ts,tsx}', 'components/**/*.{ts,tsx}'],
    ignores: ['components/theme.ts'],
    rules: { 'no-restricted-syntax': ['error', ...raw] },
  },
  {
    files: ['app/**/*.{ts,tsx}', 'components/**/*.{ts,tsx}'],
    ignores: ['components/charts/**', 'components/shell/Mark.tsx', 'components/ui/Icon.tsx'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          paths: drawn,
          patterns: [
            { group: ['**/charts/*'], message: 'Charts come on demand, through @/components/charts alone.' },
          ],
        },
      ],
    },
  },
  {
    // A table of cases may be longer than a program.
    files: ['tests/**/*.{ts,tsx}'],
    rules: { 'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }] },
  },
  {
    // Configuration files and scripts run in Node as they stand.
    files: ['*.config.js', 'tests/support/*.js', 'scripts/**/*.{ts,mjs}'],
    languageOptions: {
      globals: { __dirname: 'readonly', process: 'readonly', module: 'writable', require: 'readonly' },
    },
  },
];
