/**
 * Parts of packages that the page never uses but that would come along, because Metro keeps everything that a package's index names.
 * `tests/ui/leftOut.test.ts` checks that nobody of ours asks for them.
 */
export const unusedNative = [
  'ActivityIndicator',
  'Animated',
  'CheckBox',
  'DrawerLayoutAndroid',
  'Easing',
  'FlatList',
  'ImageBackground',
  'LayoutAnimation',
  'LogBox',
  'Modal',
  'PanResponder',
  'Picker',
  'ProgressBar',
  'RefreshControl',
  'SectionList',
  'StatusBar',
  'Switch',
  'TouchableHighlight',
  'TouchableNativeFeedback',
  'TouchableOpacity',
  'TouchableWithoutFeedback',
  'VirtualizedList',
  'YellowBox',
];

/** Navigators of expo-router that this program has no use for: its places are shown by Slot. */
export const unusedRouter = ['Stack', 'Tabs', 'ExperimentalStack'];

const router = '/expo-router/build/';

/** From which file, which request, and what stands in for it: a file in stubs/, another request, or nothing. */
const replaced = [
  { from: `${router}exports.js`, ask: './layouts/Tabs' },
  { from: `${router}exports.js`, ask: './layouts/experimental-stack' },
  { from: `${router}exports.js`, ask: './standard-navigation' },
  { from: `${router}index.js`, ask: './stack' },
  { from: `${router}layouts/StackClient.js`, ask: './stack-utils' },
  {
    from: `${router}layouts/StackClient.js`,
    ask: '../fork/native-stack/createNativeStackNavigator',
    stub: 'nativeStack.cjs',
  },
  { from: `${router}qualified-entry.js`, ask: './head', stub: 'head.cjs' },
  { from: `${router}screensFeatureFlags.js`, ask: 'react-native-screens', stub: 'screensFlags.cjs' },
  // both want one context out of all the tabs
  ...['ErrorBoundary', 'Toast'].map((view) => ({
    from: `${router}views/${view}.js`,
    ask: '../react-navigation/bottom-tabs',
    instead: '../react-navigation/bottom-tabs/utils/BottomTabBarHeightContext',
  })),
];

const nativeIndex = /\/react-native-web\/dist\/(?:cjs\/)?index\.js$/;

/** What to do with a request: undefined to go on as usual. */
export function standIn(from, ask) {
  if (nativeIndex.test(from) && unusedNative.some((name) => ask === `./exports/${name}`)) return {};
  return replaced.find((one) => from.endsWith(one.from) && ask === one.ask);
}
