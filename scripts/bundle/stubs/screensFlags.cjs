// In place of the native screens: expo-router sets their switches while it loads. In a browser there are none.
exports.featureFlags = { experiment: {} };
