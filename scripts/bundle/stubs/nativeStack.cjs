// In place of the stack navigator: expo-router makes one while it loads, to be ready for a layout that uses it. None here does.
exports.createNativeStackNavigator = () => ({ Navigator: () => null, Screen: () => null });
