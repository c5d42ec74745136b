// Three projects: pure code and the server in Node, components on the jest-expo preset, what needs the built
// app and a browser in Node.
process.env.TZ = 'UTC';

const esmPackages = [
  'victory.*',
  'd3-.*',
  'internmap',
  'delaunator',
  'delaunay-find',
  'robust-predicates',
  'pure-rand',
  'ml-.*',
  'is-any-array',
  '@scure/.*',
  '@noble/.*',
  // With its own copy of the one above inside.
  '@otplib/.*',
  'archiver',
  'zip-stream',
  'compress-commons',
  'crc32-stream',
  'is-stream',
].join('|');

const nodeProject = (name, folders) => ({
  displayName: name,
  testEnvironment: 'node',
  rootDir: __dirname,
  testMatch: folders.map((folder) => `<rootDir>/tests/${folder}/**/*.test.ts`),
  moduleNameMapper: { '^@/(.*)$': '<rootDir>/$1' },
  // Sequelize models need `declare` fields, which babel-preset-expo rejects.
  transform: { '\\.[cm]?[jt]sx?$': ['babel-jest', require('./tests/support/nodeBabel.js')] },
  transformIgnorePatterns: [`node_modules/(?!(${esmPackages})/)`],
  setupFiles: ['<rootDir>/tests/support/nodeSetup.ts'],
});

module.exports = {
  // A machine with other work to do is slower, not wrong.
  testTimeout: 30_000,
  projects: [
    nodeProject('unit', ['fit', 'measure', 'plan', 'units', 'contract', 'reference', 'demo']),
    nodeProject('server', ['server', 'moderation', 'attack']),
    {
      ...nodeProject('browser', ['browser', 'house']),
      globalSetup: '<rootDir>/tests/support/makeRunDir.js',
      globalTeardown: '<rootDir>/tests/support/dropRunDir.js',
    },
    {
      displayName: 'ui',
      preset: 'jest-expo/ios',
      rootDir: __dirname,
      testMatch: ['<rootDir>/tests/ui/**/*.test.ts?(x)'],
      moduleNameMapper: {
        '^@/(.*)$': '<rootDir>/$1',
        // The preset transforms no .mjs files, which the icons' entries are of.
        '^lucide-react-native/icons/.*$': '<rootDir>/tests/support/silentIcon.tsx',
      },
      transformIgnorePatterns: [
        `node_modules/(?!((jest-)?react-native|@react-native(-community)?|expo(nent)?|@expo(nent)?/.*|@expo-google-fonts/.*|react-navigation|@react-navigation/.*|react-native-svg|lucide-react-native|standard-navigation|${esmPackages}))`,
      ],
    },
  ],
};
