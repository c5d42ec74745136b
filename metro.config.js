// Metro bundles for the web. It does not drop unused exports of packages, so the largest of them are left out by hand:
// they resolve to an empty module. Remove when the bundler shakes re-exports (tried with SDK 56: 5 kB less, not these).
const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(__dirname);

const unused = [
  // Messages in some fifty languages; ours are written with the schemas.
  /\/zod\/v4\/locales\/index\.c?js$/,
  // JSON schemas and compiled parsers, which only servers make.
  /\/zod\/v4\/classic\/from-json-schema\.c?js$/,
  /\/zod\/v4\/core\/(json-schema-processors|compile)\.c?js$/,
  // Navigators that draw bars and headers of their own; our routes use Slot, our shell draws the rest.
  /\/expo-router\/build\/layouts\/(Tabs|Stack\.web|Stack|stack-utils\/index|experimental-stack\/index)\.js$/,
  /\/expo-router\/build\/react-navigation\/(bottom-tabs|elements|native-stack)\/index\.js$/,
  /\/expo-router\/build\/native-tabs\/index\.js$/,
  /\/react-native-screens\/lib\/module\/components\/[^/]+\.js$/,
  // Packages of the router import the whole of react-native-web; nobody of ours animates or draws endless lists.
  /\/react-native-web\/dist\/exports\/(Animated|FlatList|SectionList|VirtualizedList|CheckBox|Picker|Switch|ImageBackground)\/index\.js$/,
  // The router's own pages; ours stand in app/.
  /\/expo-router\/build\/views\/(Sitemap|Toast)\.js$/,
];

config.resolver.resolveRequest = (context, moduleName, platform) => {
  const found = context.resolveRequest(context, moduleName, platform);
  // While developing everything is there: the router looks its own pages up as it starts.
  const isUnused =
    !context.dev && found.type === 'sourceFile' && unused.some((pattern) => pattern.test(found.filePath));
  return isUnused ? { type: 'empty' } : found;
};

module.exports = config;
