import { AtkinsonHyperlegibleNext_400Regular } from '@expo-google-fonts/atkinson-hyperlegible-next/400Regular';
import { AtkinsonHyperlegibleNext_700Bold } from '@expo-google-fonts/atkinson-hyperlegible-next/700Bold';
import { BarlowCondensed_600SemiBold } from '@expo-google-fonts/barlow-condensed/600SemiBold';
import { BarlowCondensed_700Bold } from '@expo-google-fonts/barlow-condensed/700Bold';
import { PersistQueryClientProvider } from '@tanstack/react-query-persist-client';
import { FontDisplay, useFonts } from 'expo-font';
import { Slot } from 'expo-router';
import { useEffect } from 'react';

import { Toasts } from '@/components/ui/toast';
import { cacheAge, persister, queryClient } from '@/hooks/client';
import { cacheVersion } from '@/hooks/keys';

export { Broken as ErrorBoundary } from '@/components/session/Broken';

/** Words show at once in the system's font, and change when these have come. */
const swap = (uri: number) => ({ uri, display: FontDisplay.SWAP });
const fonts = {
  AtkinsonHyperlegibleNext_400Regular: swap(AtkinsonHyperlegibleNext_400Regular),
  AtkinsonHyperlegibleNext_700Bold: swap(AtkinsonHyperlegibleNext_700Bold),
  BarlowCondensed_600SemiBold: swap(BarlowCondensed_600SemiBold),
  BarlowCondensed_700Bold: swap(BarlowCondensed_700Bold),
};

export default function RootLayout() {
  useFonts(fonts);
  useEffect(() => {
    if (process.env.NODE_ENV === 'production' && 'serviceWorker' in navigator) {
      void navigator.serviceWorker.register('/sw.js');
    }
  }, []);
  return (
    <PersistQueryClientProvider
      client={queryClient}
      persistOptions={{ persister, maxAge: cacheAge, buster: cacheVersion }}
    >
      <Slot />
      <Toasts />
    </PersistQueryClientProvider>
  );
}
